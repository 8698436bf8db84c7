import type pg from 'pg';
import type { CommissionedPump } from '#server/db/commissioned-pumps.ts';
import { asMachine } from '#server/db/transaction.ts';
import type { DetectorParameters } from '#shared/domain/detectors/detector-parameters.ts';
import { makeOutcome, type PumpOutcome } from './pump-outcome.ts';
import { readPumpEvents } from './read-pump-events.ts';
import { listAnswered } from './stored-backtest-repository.ts';
import { createStoredPumpFold, type Listening } from './stored-pump-fold.ts';

export type StoredPumpJob = {
  readonly pump: CommissionedPump;
  readonly today: DetectorParameters;
  readonly proposed: DetectorParameters;
  readonly from: number;
  readonly to: number;
  readonly listening: Listening;
  /** Told how far it is, 0 to 1; answers whether to go on. */
  readonly onProgress: (share: number) => Promise<boolean>;
};

/** What is usual is learnt from what is stored of so many days before, ms. */
export const WARM_UP_MS = 14 * 86_400_000;

/**
 * Folds what is stored of one pump with today's rules and with the proposed ones, in one pass. Undefined where it was
 * called off. The event loop gets its turn between portions: mail must not wait.
 */
export async function foldStoredPump(pool: pg.Pool, job: StoredPumpJob): Promise<PumpOutcome | undefined> {
  const { pump, from, to, listening } = job;
  const start = from - WARM_UP_MS;
  const folds = [job.today, job.proposed].map((rules) => createStoredPumpFold(pump.context, rules, listening));
  let readings = 0;
  let isCalledOff = false;
  await asMachine(pool, async (_db, client) => {
    await client.query('set local statement_timeout = 0');
    for await (const events of readPumpEvents(client, pump.pumpNumber, { from: start, to })) {
      for (const { event } of events) {
        if (event.kind === 'reading') readings += 1;
        for (const fold of folds) fold.push(event);
      }
      const last = events.at(-1)?.event.receivedAt ?? start;
      isCalledOff = !(await job.onProgress((last - start) / (to - start)));
      if (isCalledOff) break;
      await new Promise((resolve) => setImmediate(resolve));
    }
  });
  if (isCalledOff) return undefined;
  for (const fold of folds) fold.passTime(to);
  const [before = [], after = []] = folds.map((fold) => fold.alarmsFrom(from));
  return makeOutcome({ before, after, answered: await listAnswered(pool, pump.pumpId, from, to), readings });
}
