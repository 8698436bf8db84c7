import { listUnadvisedPumps } from '#server/rollup/advice-repository.ts';
import { advisePumpNow } from '#server/rollup/advise-pump-now.ts';
import type { Job } from './job.ts';

const EVERY_MS = 15_000;
/** Working a program out takes up to a second of a core; a tick spends no more than about this. */
const BUDGET_MS = 1_500;
/** Pumps asked for at a time. */
const SOME = 20;
/** A pump that cannot be advised is not tried again for this long, so that it holds up none of the others. */
const AGAIN_MS = 3_600_000;
const failedAt = new Map<string, number>();

/** Works each filter pump's program out anew once a day, the longest waiting first, and notes those that cost too much. */
export const advisePrograms: Job = {
  name: 'advise programs',
  everyMs: EVERY_MS,
  run: async ({ pool, publicUrl, now, log }) => {
    const startedAt = performance.now();
    for (const [pumpId, at] of failedAt) if (now() - at >= AGAIN_MS) failedAt.delete(pumpId);
    for (const pumpId of await listUnadvisedPumps(pool, SOME, [...failedAt.keys()])) {
      if (performance.now() - startedAt > BUDGET_MS) return;
      try {
        await advisePumpNow({ pool, publicUrl, now: now() }, pumpId);
      } catch (err) {
        failedAt.set(pumpId, now());
        log.warn({ err, pumpId }, 'a program cannot be advised');
      }
    }
  },
};
