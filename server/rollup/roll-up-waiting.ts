import { type RollupOptions, rollUpPump } from './roll-up-pump.ts';
import { listWaitingPumps } from './rollup-work.ts';

/** Pumps asked for at a time. */
const SOME = 200;

export type WaitingOptions = RollupOptions & {
  /** A pump that was rolled up less than this ago waits. */
  readonly freshMs: number;
  /** Stop after so long; undefined = when nothing is left. */
  readonly budgetMs?: number;
  readonly onPump?: (pumps: number) => void;
};

export type RolledUp = {
  readonly pumps: number;
  readonly failed: readonly { readonly pumpId: string; readonly err: unknown }[];
};

/**
 * Rolls up the pumps that wait, the longest waiting first, until none is left or the time is spent. One that fails holds up
 * no other and is tried again next time.
 */
export async function rollUpWaiting(options: WaitingOptions): Promise<RolledUp> {
  const { pool, freshMs, budgetMs = Number.POSITIVE_INFINITY, onPump } = options;
  const startedAt = performance.now();
  const isOver = (): boolean => performance.now() - startedAt >= budgetMs;
  const failed = new Map<string, unknown>();
  let pumps = 0;
  while (!isOver()) {
    const waiting = (await listWaitingPumps(pool, SOME + failed.size, freshMs)).filter((pumpId) => !failed.has(pumpId));
    if (waiting.length === 0) break;
    for (const pumpId of waiting) {
      if (isOver()) break;
      try {
        while ((await rollUpPump(options, pumpId)) && !isOver());
        pumps += 1;
        onPump?.(pumps);
      } catch (err) {
        failed.set(pumpId, err);
      }
    }
  }
  return { pumps, failed: [...failed].map(([pumpId, err]) => ({ pumpId, err })) };
}
