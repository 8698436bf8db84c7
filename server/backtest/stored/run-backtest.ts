import type pg from 'pg';
import type { Logger } from 'pino';
import { type CommissionedPump, listCommissionedPumps } from '#server/db/commissioned-pumps.ts';
import { createRuleBook, layerOf, listRuleLayers, type RuledPump, type StoredLayer } from '#server/db/rule-layers.ts';
import { openDatabase } from '#server/db/transaction.ts';
import type { BacktestRequest } from './backtest-request.ts';
import { foldStoredPump, WARM_UP_MS } from './fold-stored-pump.ts';
import {
  type ClaimedBacktest,
  endBacktest,
  listDonePumps,
  listListening,
  putBack,
  reportProgress,
  saveOutcome,
} from './stored-backtest-repository.ts';

export type BacktestWork = {
  /** The machine role's. */
  readonly pool: pg.Pool;
  readonly now: () => number;
  readonly log: Logger;
  /** The process is about to end. */
  readonly isStopping: () => boolean;
};

/** The row is told of progress at most this often, ms. */
const REPORT_EVERY_MS = 1000;

/**
 * Folds the pumps of a backtest one after another. What a pump gave is stored when it is done, so that whoever takes the
 * backtest up after us goes on behind it; a pump that cannot be folded is noted and holds nothing up.
 */
export async function runBacktest(work: BacktestWork, claimed: ClaimedBacktest): Promise<void> {
  const { pool, now, log } = work;
  const { id, companyId, request } = claimed;
  const report = createReport(work, id);
  const layers = await listRuleLayers(openDatabase(pool), companyId);
  const today = createRuleBook(layers);
  const proposed = createRuleBook(withProposed(layers, companyId, request));
  const listening = await listListening(pool, request.from - WARM_UP_MS, request.to);
  const done = await listDonePumps(pool, id);
  const { from, to } = request;
  for (const pumpId of request.pumpIds) {
    if (done.has(pumpId)) continue;
    if (!(await report(0))) return leave(work, id);
    const [pump] = await listCommissionedPumps(openDatabase(pool), [pumpId]);
    if (pump === undefined || pump.companyId !== companyId) {
      await saveOutcome(pool, claimed, pumpId, { kind: 'failed', reason: 'It is not watched any more.' });
      continue;
    }
    const rules = { today: today(ruledPump(pump)), proposed: proposed(ruledPump(pump)) };
    try {
      const outcome = await foldStoredPump(pool, { pump, ...rules, from, to, listening, onProgress: report });
      if (outcome === undefined) return leave(work, id);
      await saveOutcome(pool, claimed, pumpId, outcome);
    } catch (error) {
      if (!(error instanceof Error) || !('detector' in error)) throw error;
      log.error({ err: error, pump: pumpId }, 'a backtest could not fold a pump');
      await saveOutcome(pool, claimed, pumpId, { kind: 'failed', reason: error.message });
    }
  }
  await endBacktest(pool, id, { state: 'done', now: now() });
}

const ruledPump = ({ companyId, modelId, pumpId }: CommissionedPump): RuledPump => ({ companyId, modelId, pumpId });

/** Stops in the middle: for good where somebody called it off, for the next worker where we end. */
async function leave({ pool, now, isStopping }: BacktestWork, backtestId: string): Promise<void> {
  if (isStopping()) await putBack(pool, backtestId);
  else await endBacktest(pool, backtestId, { state: 'cancelled', now: now() });
}

function createReport(work: BacktestWork, backtestId: string): (share: number) => Promise<boolean> {
  let reportedAt = Number.NEGATIVE_INFINITY;
  return async (share) => {
    if (work.isStopping()) return false;
    if (performance.now() - reportedAt < REPORT_EVERY_MS) return true;
    reportedAt = performance.now();
    return reportProgress(work.pool, backtestId, share, work.now());
  };
}

/** What is set, with the proposal in place of what stands at its scope. */
function withProposed(
  layers: readonly StoredLayer[],
  companyId: string,
  { scope, rules }: BacktestRequest,
): StoredLayer[] {
  const place = { companyId, ...layerOf(scope) };
  const others = layers.filter(({ modelId, pumpId }) => modelId !== place.modelId || pumpId !== place.pumpId);
  return [...others, { ...place, rules }];
}
