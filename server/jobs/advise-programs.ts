import { openDatabase } from '#server/db/transaction.ts';
import { listUnadvisedPumps } from '#server/rollup/advice-repository.ts';
import { advisePumpNow } from '#server/rollup/advise-pump-now.ts';
import type { Job } from './job.ts';

const EVERY_MS = 15_000;
/** Working a program out takes up to a second of a core; a tick spends no more than about this. */
const BUDGET_MS = 1_500;
/** Pumps asked for at a time. */
const SOME = 20;

/** Works each filter pump's program out anew once a day, for the pumps that have waited longest. */
export const advisePrograms: Job = {
  name: 'advise programs',
  everyMs: EVERY_MS,
  run: async ({ pool, now, log }) => {
    const startedAt = performance.now();
    for (const pumpId of await listUnadvisedPumps(pool, SOME)) {
      if (performance.now() - startedAt > BUDGET_MS) return;
      try {
        await advisePumpNow(openDatabase(pool), pumpId, now());
      } catch (err) {
        log.warn({ err, pumpId }, 'a program cannot be advised');
      }
    }
  },
};
