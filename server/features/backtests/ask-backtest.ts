import type { Context } from '#server/context.ts';
import { recordAct } from '#server/db/record-act.ts';
import { conflict, invalid } from '#server/errors.ts';
import { readRules } from '#server/features/rules/index.ts';
import type { AskBacktest, Backtest } from '#shared/contract/http/backtests.ts';
import { listPumpsOfScope } from './backtest-read-model.ts';
import { addBacktest } from './backtest-repository.ts';
import { getBacktest } from './read-backtest.ts';

/** Asks the worker to fold what is stored with a change of rules and without. */
export async function askBacktest(context: Context, asked: AskBacktest): Promise<Backtest> {
  const { db, actor, now } = context;
  const { scope, rules, from } = asked;
  if (from >= now) throw invalid('body.from', 'lies in the past: only what is stored can be folded');
  const { name } = await readRules(context, scope);
  const pumpIds = await listPumpsOfScope(db, actor.companyId, scope);
  if (pumpIds.length === 0) throw invalid('body.scope', 'reaches no pump that is watched');
  const to = Math.min(asked.to, now);
  const backtestId = await addBacktest(context, { scope, scopeName: name, rules, from, to, pumpIds });
  if (backtestId === undefined) {
    throw conflict('A backtest of your company is underway. Wait for it, or call it off.');
  }
  await recordAct(context, { action: 'backtest.asked', subjectKind: 'backtest', subjectId: backtestId });
  return getBacktest(context, backtestId);
}
