import type pg from 'pg';
import type { RaisedAlarm } from '#shared/domain/backtest/compare-alarms.ts';
import { type BacktestRequest, parseRequest } from './backtest-request.ts';
import type { PumpOutcome } from './pump-outcome.ts';

type Database = Pick<pg.ClientBase, 'query'>;

/** A backtest that is ours to work on. */
export type ClaimedBacktest = { readonly id: string; readonly companyId: string; readonly request: BacktestRequest };

/** A worker that has not said for so long that it works is taken for dead, ms. */
const FORSAKEN_AFTER_MS = 30_000;

/** Takes the oldest backtest that waits, or that no living worker works on; undefined where there is none. */
export async function claimBacktest(database: Database, now: number): Promise<ClaimedBacktest | undefined> {
  const { rows } = await database.query<{ id: string; company_id: string; request: unknown }>(
    `update backtests b set state = 'running', worked_at = to_timestamp($1::float8 / 1000),
       started_at = coalesce(b.started_at, to_timestamp($1::float8 / 1000))
     where b.id = (select id from backtests where state = 'waiting'
         or state = 'running' and (worked_at is null or worked_at < to_timestamp(($1::float8 - $2::float8) / 1000))
       order by asked_at, id limit 1 for update skip locked)
     returning b.id, b.company_id, b.request`,
    [now, FORSAKEN_AFTER_MS],
  );
  const [row] = rows;
  return row && { id: row.id, companyId: row.company_id, request: parseRequest(row.request) };
}

/** Says that we work on it, and how far into the present pump we are; answers whether to go on. */
export async function reportProgress(
  database: Database,
  backtestId: string,
  share: number,
  now: number,
): Promise<boolean> {
  const { rows } = await database.query<{ go_on: boolean }>(
    `update backtests set worked_at = to_timestamp($2::float8 / 1000), permille_of_pump = $3
     where id = $1 and state = 'running' returning cancel_asked_at is null as go_on`,
    [backtestId, now, Math.round(Math.min(1, Math.max(0, share)) * 1000)],
  );
  return rows[0]?.go_on === true;
}

/** Leaves it for the next worker, which goes on behind the pumps that are done. */
export async function putBack(database: Database, backtestId: string): Promise<void> {
  await database.query(`update backtests set worked_at = null where id = $1 and state = 'running'`, [backtestId]);
}

/** Ends it. */
export async function endBacktest(
  database: Database,
  backtestId: string,
  end: { readonly state: 'done' | 'failed' | 'cancelled'; readonly failure?: string; readonly now: number },
): Promise<void> {
  await database.query(
    `update backtests set state = $2, failure = $3, ended_at = to_timestamp($4::float8 / 1000), permille_of_pump = 0
     where id = $1 and state = 'running'`,
    [backtestId, end.state, end.failure?.slice(0, 500) ?? null, end.now],
  );
}

/** Pumps of which the outcome is stored already. */
export async function listDonePumps(database: Database, backtestId: string): Promise<Set<string>> {
  const { rows } = await database.query<{ pump_id: string }>(
    'select pump_id from backtest_pumps where backtest_id = $1',
    [backtestId],
  );
  return new Set(rows.map(({ pump_id }) => pump_id));
}

/** Stores what was found on one pump, once. */
export async function saveOutcome(
  database: Database,
  { id, companyId }: ClaimedBacktest,
  pumpId: string,
  outcome: PumpOutcome,
): Promise<void> {
  await database.query(
    `with added as (
       insert into backtest_pumps (company_id, backtest_id, pump_id, outcome) values ($1, $2, $3, $4)
       on conflict do nothing returning pump_id)
     update backtests set pumps_done = pumps_done + 1, readings = readings + $5, permille_of_pump = 0
     where id = $2 and exists (select from added)`,
    [companyId, id, pumpId, JSON.stringify(outcome), outcome.kind === 'folded' ? outcome.readings : 0],
  );
}

/** Alarms of a pump in a range that somebody answered with "nothing to do". */
export async function listAnswered(
  database: Database,
  pumpId: string,
  from: number,
  to: number,
): Promise<RaisedAlarm[]> {
  const { rows } = await database.query<RaisedAlarm>(
    `select detector, alarm_class as "alarmClass", priority, cause, round(extract(epoch from from_at) * 1000)::float8 as "from",
       round(extract(epoch from raised_at) * 1000)::float8 as raised, round(extract(epoch from returned_at) * 1000)::float8 as "to"
     from alarms where pump_id = $1 and jsonb_typeof(record -> 'answer') = 'object'
       and raised_at >= to_timestamp($2::float8 / 1000) and raised_at < to_timestamp($3::float8 / 1000)`,
    [pumpId, from, to],
  );
  return rows;
}

/** When the server listened, ms, in order. */
export async function listListening(
  database: Database,
  from: number,
  to: number,
): Promise<{ from: number; to: number }[]> {
  const { rows } = await database.query<{ from: number; to: number }>(
    `select round(extract(epoch from started_at) * 1000)::float8 as "from", round(extract(epoch from alive_at) * 1000)::float8 as "to"
     from listening_periods where alive_at >= to_timestamp($1::float8 / 1000) and started_at < to_timestamp($2::float8 / 1000)
     order by started_at`,
    [from, to],
  );
  return rows;
}
