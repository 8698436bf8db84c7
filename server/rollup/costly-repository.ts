import type pg from 'pg';
import type { CostlyMemory } from '#shared/domain/advisor/judge-costly-program.ts';
import type { LocalDay } from '#shared/domain/time/local-days.ts';

type Database = Pick<pg.ClientBase, 'query'>;

/** A day counts when at least this share of it was told by readings. */
const TOLD_SHARE = 0.5;

/** What `costly-program` remembers of a pump; undefined where it never looked at it. */
export async function findCostlyMemory(database: Database, pumpId: string): Promise<CostlyMemory | undefined> {
  const { rows } = await database.query<{ memory: CostlyMemory | null }>(
    'select costly_memory as memory from program_advice where pump_id = $1',
    [pumpId],
  );
  return rows[0]?.memory ?? undefined;
}

/** The same, locked until the transaction ends. */
export async function lockCostlyMemory(database: Database, pumpId: string): Promise<CostlyMemory | undefined> {
  const { rows } = await database.query<{ memory: CostlyMemory | null }>(
    'select costly_memory as memory from program_advice where pump_id = $1 for update',
    [pumpId],
  );
  return rows[0]?.memory ?? undefined;
}

export async function saveCostlyMemory(database: Database, pumpId: string, memory: CostlyMemory): Promise<void> {
  await database.query('update program_advice set costly_memory = $2 where pump_id = $1', [
    pumpId,
    JSON.stringify(memory),
  ]);
}

/**
 * Those of some days on which the pump is known to have been as it is commissioned now: its runs tell of most of the
 * day, and its settings were never commissioned anew, since from when they hold is not kept.
 */
export async function listToldDays(database: Database, pumpId: string, days: readonly LocalDay[]): Promise<number[]> {
  const { rows } = await database.query<{ epochDay: number }>(
    `select d.epoch_day as "epochDay"
     from unnest($2::int[], $3::float8[], $4::float8[]) as d(epoch_day, from_ms, to_ms)
     join pumps p on p.id = $1 and p.settings_version = 1
     join runs r on r.pump_id = p.id and r.from_at < to_timestamp(d.to_ms / 1000)
       and coalesce(r.to_at, to_timestamp(d.to_ms / 1000)) > to_timestamp(d.from_ms / 1000)
     cross join lateral (select date_part('epoch', r.from_at) * 1000 as "from",
       coalesce(date_part('epoch', r.to_at) * 1000, date_part('epoch', r.from_at) * 1000 + r.covered_ms) as "to") run
     group by d.epoch_day, d.from_ms, d.to_ms
     having sum(case when run."to" > run."from" then r.covered_ms / (run."to" - run."from") else 0 end
       * greatest(0, least(run."to", d.to_ms) - greatest(run."from", d.from_ms))) >= $5 * (d.to_ms - d.from_ms)
     order by 1`,
    [pumpId, days.map((day) => day.epochDay), days.map((day) => day.from), days.map((day) => day.to), TOLD_SHARE],
  );
  return rows.map(({ epochDay }) => epochDay);
}
