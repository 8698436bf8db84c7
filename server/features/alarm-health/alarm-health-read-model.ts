import { sql } from 'drizzle-orm';
import type { Transaction } from '#server/db/transaction.ts';
import type { NamedAlarm } from '#shared/contract/http/alarm-health.ts';
import type { AlarmLife, LifeChange } from '#shared/domain/alarm-health/alarm-life.ts';

/** The company's zone, and the first instant anything is known of: a pump's first run, or the company's own beginning. */
export async function findCompanyBeginning(
  db: Transaction,
  companyId: string,
): Promise<{ readonly zone: string; readonly beganAt: number }> {
  const { rows } = await db.execute<{ zone: string; beganAt: number }>(sql`
    select c.zone, (extract(epoch from least(c.created_at, first.from_at)) * 1000)::float8 as "beganAt"
    from companies c
    cross join (
      select min((select r.from_at from runs r where r.pump_id = p.id order by r.from_at limit 1)) as from_at
      from pumps p where p.company_id = ${companyId}
    ) first
    where c.id = ${companyId}`);
  const [row] = rows;
  return row === undefined ? { zone: 'UTC', beganAt: 0 } : { ...row, beganAt: Math.floor(row.beganAt) };
}

type LifeRow = Omit<AlarmLife, 'changes'> & {
  readonly changes: readonly (readonly [
    kind: LifeChange['kind'],
    at: number,
    priority: LifeChange['priority'],
    by: string | null,
    explained: boolean,
  ])[];
};

/**
 * The life of every alarm that may have stood in a stretch, from its beginning: an open one, and one that was over by the
 * stretch but not long before. Notes are left out. Its operator is the technician of its pad today.
 */
export async function listAlarmLives(
  db: Transaction,
  companyId: string,
  from: number,
  until: number,
): Promise<AlarmLife[]> {
  const { rows } = await db.execute<LifeRow>(sql`
    select a.id as "alarmId", a.pump_id as "pumpId", a.detector, pad.technician_id as "operatorId", life.changes
    from alarms a
    left join pads pad on pad.id = a.pad_id
    cross join lateral (
      select json_agg(json_build_array(t.kind, extract(epoch from t.at) * 1000, t.priority, t.by_user_id,
        coalesce(t.note, '') <> '') order by t.at, t.id) as changes
      from alarm_transitions t where t.alarm_id = a.id and t.at < ${new Date(until)}
    ) life
    where a.company_id = ${companyId} and a.alarm_class = 'alarm' and a.raised_at < ${new Date(until)}
      and (a.state <> 'normal' or greatest(a.raised_at, a.returned_at, a.acknowledged_at) >= ${new Date(from)})
      and life.changes is not null`);
  return rows.map(({ changes, ...life }) => ({
    ...life,
    changes: changes.map(([kind, at, priority, by, explained]) => ({
      kind,
      at: Math.round(at),
      priority,
      by,
      explained,
    })),
  }));
}

/** Names of alarms for the screen. */
export async function listAlarmNames(
  db: Transaction,
  companyId: string,
  alarmIds: readonly string[],
): Promise<Map<string, NamedAlarm>> {
  if (alarmIds.length === 0) return new Map();
  const { rows } = await db.execute<NamedAlarm>(sql`
    select a.id as "alarmId", a.pump_id as "pumpId", pad.name as "padName", p.name as "pumpName", a.detector, a.cause, a.evidence
    from alarms a left join pumps p on p.id = a.pump_id left join pads pad on pad.id = a.pad_id
    where a.company_id = ${companyId} and a.id = any(${sql.param([...alarmIds])}::uuid[])`);
  return new Map(rows.map((row) => [row.alarmId, row]));
}

/** Names of people by their ids. */
export async function listPeopleNames(
  db: Transaction,
  companyId: string,
  userIds: readonly string[],
): Promise<Map<string, string>> {
  if (userIds.length === 0) return new Map();
  const { rows } = await db.execute<{ id: string; name: string }>(sql`
    select id, name from users where company_id = ${companyId} and id = any(${sql.param([...userIds])}::uuid[])`);
  return new Map(rows.map(({ id, name }) => [id, name]));
}
