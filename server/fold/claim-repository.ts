import type pg from 'pg';
import type { ClaimedState } from './claimed-state.ts';
import { listLivingEpochs } from './ownership.ts';

type Row = {
  readonly pump_id: string;
  readonly cursor: number;
  readonly hot: unknown;
  readonly learnt: unknown;
  readonly learnt_version: number | null;
  readonly heard_at: number | null;
  readonly silent_since: number | null;
  readonly lost_at: number | null;
  readonly quarantined: boolean;
  readonly previous_epoch: number;
};

const MAKE_MISSING = `insert into pump_states (pump_id, company_id, pump_number)
  select p.id, p.company_id, p.number from pumps p where p.monitored and ($1::uuid[] is null or p.id = any($1))
  on conflict do nothing`;

const CLAIM = `with claimed as (
  update pump_states s set epoch = $2 from (
    select o.pump_id, o.epoch from pump_states o join pumps p on p.id = o.pump_id and p.monitored
    where ($1::uuid[] is null or o.pump_id = any($1)) and o.epoch <> $2 and o.epoch <> all($3::int[])
    for update of o
  ) before
  where s.pump_id = before.pump_id
  returning s.*, before.epoch as previous_epoch)
select c.pump_id, c.cursor::float8 as cursor, c.hot, l.learnt, l.version as learnt_version, c.previous_epoch,
  date_part('epoch', c.heard_at) * 1000 as heard_at, date_part('epoch', c.silent_since) * 1000 as silent_since,
  date_part('epoch', c.lost_at) * 1000 as lost_at, c.quarantined_at is not null as quarantined
from claimed c left join pump_learnt l on l.pump_id = c.pump_id`;

const RELOAD = `select s.pump_id, s.cursor::float8 as cursor, s.hot, l.learnt, l.version as learnt_version,
  s.epoch as previous_epoch, date_part('epoch', s.heard_at) * 1000 as heard_at,
  date_part('epoch', s.silent_since) * 1000 as silent_since, date_part('epoch', s.lost_at) * 1000 as lost_at,
  s.quarantined_at is not null as quarantined
from pump_states s left join pump_learnt l on l.pump_id = s.pump_id
where s.pump_id = any($1::uuid[]) and s.epoch = $2`;

/** Makes this process the owner of monitored pumps that no living process owns. */
export async function claimFreePumps(client: pg.ClientBase, epoch: number): Promise<ClaimedState[]> {
  await client.query(MAKE_MISSING, [null]);
  const living = await listLivingEpochs(client);
  const { rows } = await client.query<Row>(CLAIM, [null, epoch, living]);
  return rows.map((row) => toClaimedState(row, []));
}

/** Makes this process the owner of these pumps, whoever owns them: their devices are connected here now. */
export async function claimPumps(
  client: pg.ClientBase,
  epoch: number,
  pumpIds: readonly string[],
): Promise<ClaimedState[]> {
  await client.query(MAKE_MISSING, [pumpIds]);
  const living = await listLivingEpochs(client);
  const { rows } = await client.query<Row>(CLAIM, [pumpIds, epoch, []]);
  return rows.map((row) => toClaimedState(row, living));
}

/** The states of pumps that this process owns, as they are stored; those it owns no more are missing. */
export async function loadOwnStates(
  client: Pick<pg.ClientBase, 'query'>,
  epoch: number,
  pumpIds: readonly string[],
): Promise<ClaimedState[]> {
  const { rows } = await client.query<Row>(RELOAD, [pumpIds, epoch]);
  return rows.map((row) => toClaimedState(row, []));
}

function toClaimedState(row: Row, living: readonly number[]): ClaimedState {
  return {
    pumpId: row.pump_id,
    cursor: row.cursor,
    hot: row.hot,
    learnt: row.learnt,
    learntVersion: row.learnt_version ?? -1,
    heardAt: row.heard_at ?? undefined,
    silentSince: row.silent_since ?? undefined,
    lostAt: row.lost_at ?? undefined,
    quarantined: row.quarantined,
    takenOver: living.includes(row.previous_epoch),
  };
}
