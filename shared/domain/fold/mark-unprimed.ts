import { STANDSTILL_RPM } from '../control/speed-tolerance.ts';
import type { Facts } from '../detectors/facts.ts';

/** How a start stood just before a reading. */
export type TryBefore = {
  readonly failedTries: number;
  /** Turning without load, and never loaded since it started. */
  readonly unprimed: boolean;
  readonly source: string;
};

/** To be taken before a reading is folded. */
export const tryBefore = ({ load, control }: Facts): TryBefore => ({
  failedTries: load.failedTries,
  unprimed: load.primed === false && !load.primedOnce,
  source: control.decision.source,
});

/**
 * Whether the reading now folded ends a prime that never carried load, so that the run before it is marked: a try that
 * counts as failed, or one that the motor leaves when its prime time is over, give or take a reading, since a start is
 * seen up to one reading late.
 */
export function isTryOver({ reading, load, control, context, now }: Facts, before: TryBefore): boolean {
  if (load.failedTries > before.failedTries) return true;
  const left = reading.rpm <= STANDSTILL_RPM || control.decision.source !== before.source;
  return before.unprimed && left && now >= load.primeEndsAt - context.intervalSeconds * 1000;
}
