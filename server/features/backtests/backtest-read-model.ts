import { type SQL, sql } from 'drizzle-orm';
import { type PumpOutcome, parseOutcome } from '#server/backtest/stored/pump-outcome.ts';
import { isInScope } from '#server/db/rule-layers.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { RuleScope } from '#shared/contract/http/rules.ts';

/** A backtest as it is stored; instants in ms. */
export type BacktestRow = {
  readonly id: string;
  readonly state: 'waiting' | 'running' | 'done' | 'failed' | 'cancelled';
  readonly request: unknown;
  readonly askedAt: number;
  readonly askedBy: string | null;
  readonly startedAt: number | null;
  readonly endedAt: number | null;
  readonly pumps: number;
  readonly pumpsDone: number;
  readonly readings: number;
  readonly permilleOfPump: number;
  readonly cancelAsked: boolean;
  readonly failure: string | null;
};

const ms = (column: string) => sql`round(extract(epoch from ${sql.raw(column)}) * 1000)::float8`;

async function selectBacktests(db: Transaction, which: SQL, limit: number): Promise<BacktestRow[]> {
  const { rows } = await db.execute<BacktestRow>(sql`
    select b.id, b.state, b.request, ${ms('b.asked_at')} as "askedAt", asker.name as "askedBy",
      ${ms('b.started_at')} as "startedAt", ${ms('b.ended_at')} as "endedAt", b.pump_count as pumps,
      b.pumps_done as "pumpsDone", b.readings, b.permille_of_pump as "permilleOfPump",
      b.cancel_asked_at is not null as "cancelAsked", b.failure
    from backtests b left join users asker on asker.id = b.asked_by
    where ${which} order by b.asked_at desc, b.id desc limit ${limit}`);
  return rows;
}

/** One backtest of the person's company. */
export const findBacktest = async (
  db: Transaction,
  companyId: string,
  backtestId: string,
): Promise<BacktestRow | undefined> =>
  (await selectBacktests(db, sql`b.company_id = ${companyId} and b.id = ${backtestId}`, 1))[0];

/** The newest of the person's company. */
export const listLatestBacktests = (db: Transaction, companyId: string, limit: number): Promise<BacktestRow[]> =>
  selectBacktests(db, sql`b.company_id = ${companyId}`, limit);

export type OutcomeRow = {
  readonly pumpId: string;
  readonly pumpName: string;
  readonly padName: string;
  readonly zone: string;
  readonly outcome: PumpOutcome;
};

/** What was found so far, pump by pump. */
export async function listOutcomes(db: Transaction, backtestId: string): Promise<OutcomeRow[]> {
  const { rows } = await db.execute<OutcomeRow>(sql`
    select o.pump_id as "pumpId", p.name as "pumpName", pad.name as "padName", pad.zone, o.outcome
    from backtest_pumps o join pumps p on p.id = o.pump_id join pads pad on pad.id = p.pad_id
    where o.backtest_id = ${backtestId} order by lower(pad.name), p.name`);
  return rows.map((row) => ({ ...row, outcome: parseOutcome(row.outcome) }));
}

/** Watched pumps that a scope reaches. */
export async function listPumpsOfScope(db: Transaction, companyId: string, scope: RuleScope): Promise<string[]> {
  const { rows } = await db.execute<{ id: string }>(sql`
    select p.id from pumps p where p.company_id = ${companyId} and ${isInScope(scope)} order by p.number`);
  return rows.map(({ id }) => id);
}
