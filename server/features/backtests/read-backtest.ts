import type { Context } from '#server/context.ts';
import { notFound } from '#server/errors.ts';
import type { Backtest, BacktestResult } from '#shared/contract/http/backtests.ts';
import { type BacktestRow, findBacktest, listLatestBacktests, listOutcomes } from './backtest-read-model.ts';
import { presentBacktest, presentResult } from './present-backtest.ts';

const LATEST = 20;

async function getRow({ db, actor }: Context, backtestId: string): Promise<BacktestRow> {
  const row = await findBacktest(db, actor.companyId, backtestId);
  if (row === undefined) throw notFound('backtest');
  return row;
}

/** How far a backtest is. */
export const getBacktest = async (context: Context, backtestId: string): Promise<Backtest> =>
  presentBacktest(await getRow(context, backtestId));

/** A backtest with what it found so far. */
export async function readBacktest(context: Context, backtestId: string): Promise<BacktestResult> {
  return presentResult(await getRow(context, backtestId), await listOutcomes(context.db, backtestId));
}

/** The latest backtests of the company, the newest first. */
export const listBacktests = async ({ db, actor }: Context): Promise<{ items: Backtest[] }> => ({
  items: (await listLatestBacktests(db, actor.companyId, LATEST)).map(presentBacktest),
});
