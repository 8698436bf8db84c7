import type { Context } from '#server/context.ts';
import { recordAct } from '#server/db/record-act.ts';
import type { Backtest } from '#shared/contract/http/backtests.ts';
import { callOff } from './backtest-repository.ts';
import { getBacktest } from './read-backtest.ts';

/** Calls a backtest off; one that has ended stays as it is. */
export async function cancelBacktest(context: Context, backtestId: string): Promise<Backtest> {
  const { state } = await getBacktest(context, backtestId);
  if (state !== 'waiting' && state !== 'running') return getBacktest(context, backtestId);
  await callOff(context, backtestId);
  await recordAct(context, { action: 'backtest.called-off', subjectKind: 'backtest', subjectId: backtestId });
  return getBacktest(context, backtestId);
}
