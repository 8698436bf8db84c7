import type pg from 'pg';
import { newId } from '#server/db/new-id.ts';
import { readRecord } from '#shared/domain/alarms/read-record.ts';
import type { AreaSignal } from '#shared/domain/fold/area/area-signal.ts';
import type { AreaStanding } from '#shared/domain/fold/fold-area.ts';
import type { AlarmChange, OpenAlarm } from '../alarm-change.ts';

type Database = Pick<pg.ClientBase, 'query'>;

/**
 * A watched pump that was ever heard; `lastWord` = its last word while it is silent, else 0; `fellAt` = when its load fell
 * all at once, as its stored alarm says, else 0; `lostAt` = when its connection dropped, else 0.
 */
export type AreaMember = {
  readonly pumpId: string;
  readonly padId: string;
  readonly area: string | null;
  readonly lastWord: number;
  readonly fellAt: number;
  readonly lostAt: number;
};

/** The alarms of a company's area fold as they were saved, locked until the transaction ends. */
export async function lockAreaState(database: Database, companyId: string): Promise<unknown> {
  await database.query(`insert into area_states (company_id, state) values ($1, '[]') on conflict do nothing`, [
    companyId,
  ]);
  const { rows } = await database.query<{ state: unknown }>(
    'select state from area_states where company_id = $1 for update',
    [companyId],
  );
  return rows[0]?.state;
}

/** Stores what the area fold goes on from. */
export async function saveAreaState(database: Database, companyId: string, alarms: string): Promise<void> {
  await database.query('update area_states set state = $2, updated_at = now() where company_id = $1', [
    companyId,
    alarms,
  ]);
}

/** Every pump of a company that is watched and was ever heard. */
export async function listAreaMembers(database: Database, companyId: string): Promise<AreaMember[]> {
  const { rows } = await database.query<AreaMember>({
    name: 'list-area-members',
    text: `select p.id as "pumpId", p.pad_id as "padId", pad.area,
        case when s.silent_since is null then 0 else round(date_part('epoch', s.heard_at) * 1000) end as "lastWord",
        coalesce(round(date_part('epoch', fall.from_at) * 1000), 0) as "fellAt",
        coalesce(round(date_part('epoch', s.lost_at) * 1000), 0) as "lostAt"
      from pump_states s join pumps p on p.id = s.pump_id join pads pad on pad.id = p.pad_id
      left join alarms fall on fall.pump_id = p.id and fall.detector = 'low-load' and fall.state <> 'normal'
        and fall.cause = 'sudden' and fall.returned_at is null
      where s.company_id = $1 and p.monitored and s.heard_at is not null`,
    values: [companyId],
  });
  return rows;
}

/** The open alarms of some keys, locked. */
export async function lockGroupAlarms(
  database: Database,
  companyId: string,
  keys: readonly string[],
): Promise<Map<string, OpenAlarm>> {
  const { rows } = await database.query<{ id: string; group_key: string; record: unknown }>(
    `select id, group_key, record from alarms
     where company_id = $1 and group_key = any($2::text[]) and state <> 'normal' order by id for update`,
    [companyId, keys],
  );
  return new Map(
    rows.map(({ id, group_key, record }) => [
      group_key,
      { alarmId: id, companyId, pumpId: null, padId: null, record: readRecord(record) },
    ]),
  );
}

/** Makes the row of an alarm that speaks for several pumps; its state is saved as that of any other. */
export async function insertGroupAlarm(
  database: Database,
  { companyId, record }: Pick<AlarmChange, 'companyId' | 'record'>,
  { key, kind, area }: Pick<AreaSignal, 'key' | 'kind' | 'area'>,
): Promise<string> {
  const id = newId();
  await database.query(
    `insert into alarms (id, company_id, group_key, group_kind, group_area, detector, alarm_class, priority, state, cause,
       evidence, from_at, raised_at, record, version)
     values ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11, to_timestamp($12::float8 / 1000), to_timestamp($13::float8 / 1000), $14, 0)`,
    [
      ...[id, companyId, key, kind, area, record.detector, record.alarmClass, record.priority, record.state],
      ...[record.cause, JSON.stringify(record.evidence), record.from, record.raisedAt, JSON.stringify(record)],
    ],
  );
  return id;
}

/** Writes who belongs to an alarm and of whom something still stands. */
export async function saveMembers(
  database: Database,
  companyId: string,
  alarmId: string,
  { pumpIds, open }: Pick<AreaStanding, 'pumpIds' | 'open'>,
  now: number,
): Promise<void> {
  await database.query(
    `insert into alarm_members (company_id, alarm_id, pump_id, joined_at, left_at)
     select $1, $2, p.id, to_timestamp($5::float8 / 1000), case when p.id = any($4::uuid[]) then null else to_timestamp($5::float8 / 1000) end
     from pumps p where p.company_id = $1 and p.id = any($3::uuid[])
     on conflict (alarm_id, pump_id) do update set left_at =
       case when excluded.left_at is null then null else coalesce(alarm_members.left_at, excluded.left_at) end`,
    [companyId, alarmId, pumpIds, open, now],
  );
}

/** Names of the pads that some pumps stand on, by name; at most `limit` and how many there are. */
export async function listPadNames(
  database: Database,
  pumpIds: readonly string[],
  limit: number,
): Promise<{ readonly names: readonly string[]; readonly count: number }> {
  const { rows } = await database.query<{ name: string; count: number }>(
    `select pad.name, (count(*) over ())::int as count from pads pad
     where pad.id in (select pad_id from pumps where id = any($1::uuid[])) order by pad.name limit $2`,
    [pumpIds, limit],
  );
  return { names: rows.map(({ name }) => name), count: rows[0]?.count ?? 0 };
}

export type Cover = { readonly alarmId: string; readonly coveredBy: string | null };

/** Says of alarms which other one speaks for them. */
export async function saveCovers(database: Database, covers: readonly Cover[]): Promise<void> {
  if (covers.length === 0) return;
  await database.query(
    `update alarms a set covered_by = g.covered_by
     from json_to_recordset($1::json) as g(id uuid, covered_by uuid) where a.id = g.id`,
    [JSON.stringify(covers.map(({ alarmId, coveredBy }) => ({ id: alarmId, covered_by: coveredBy })))],
  );
}
