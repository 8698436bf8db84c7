import type { PumpContext } from '../control/pump-context.ts';
import { type Json, restoreState } from '../detectors/plain-state.ts';

/** `seconds` = the learnt interval, 0 = the commissioned one holds; `alike` readings in a row came `lastMs` apart. */
type Memory = { commissioned: number; seconds: number; alike: number; lastMs: number };

/** So many readings in a row, as far apart as one another, are a pace and no gaps. */
const ALIKE_READINGS = 8;
const ALIKE_SHARE = 0.2;
/** Slower than recorded by this much is another pace: at three times it every second reading would be a gap. */
const SLOWER_SHARE = 1.5;
/** The slowest device, with some slack, ms. */
const SLOWEST_MS = 90_000;

/** The interval at which a device really sends, where it is slower than anybody recorded. */
export type ReadingPace = {
  /** The commissioned data with the interval that holds. */
  readonly context: PumpContext;
  /** Takes the time since the last reading, ms; answers whether the interval turned out to be another. */
  readonly read: (elapsedMs: number) => boolean;
  readonly save: () => Json;
};

/**
 * A pace that goes on from what was saved. Without it a device that sends once a minute, recorded as one that sends
 * every ten seconds, would be all gaps.
 *
 * @example createReadingPace(context, undefined).context.intervalSeconds // as commissioned
 */
export function createReadingPace(context: PumpContext, saved: unknown): ReadingPace {
  const fresh: Memory = { commissioned: context.intervalSeconds, seconds: 0, alike: 0, lastMs: 0 };
  const before = restoreState(fresh, saved);
  const memory = before.commissioned === context.intervalSeconds ? before : fresh;
  const intervalSeconds = Math.max(context.intervalSeconds, memory.seconds);
  return {
    context: intervalSeconds === context.intervalSeconds ? context : { ...context, intervalSeconds },
    read: (elapsedMs) => {
      if (elapsedMs <= SLOWER_SHARE * intervalSeconds * 1000 || elapsedMs > SLOWEST_MS) {
        memory.alike = 0;
        return false;
      }
      const alike = Math.abs(elapsedMs - memory.lastMs) <= ALIKE_SHARE * elapsedMs;
      memory.alike = alike ? memory.alike + 1 : 1;
      memory.lastMs = elapsedMs;
      if (memory.alike < ALIKE_READINGS) return false;
      memory.seconds = Math.round(elapsedMs / 1000);
      memory.alike = 0;
      return true;
    },
    save: () => ({ ...memory }),
  };
}
