import type { Reading } from '../readings/reading.ts';
import type { ControlState } from './control-state.ts';
import type { ProgramSlot } from './program-timeline.ts';

/** What is known of the moment between the last reading and this one. */
export type Step = { readonly reading: Reading; readonly standing: boolean; readonly gap: boolean };

/**
 * Follows starts and stops of the shaft. A start lies between the last reading at standstill and the first that
 * turns: where something came due in between, it is that instant. A start inside a gap was not seen; then a prime may
 * be running since before, and counts only while the shaft turns at the prime's speed.
 */
export function trackMotion(state: ControlState, { reading, standing, gap }: Step): void {
  const wasStanding = state.standing;
  state.standing = standing;
  if (standing) {
    state.startedAt = null;
    state.assumedSince = null;
  } else if (gap) {
    if (wasStanding || !state.seen) state.startedAt = null;
    state.assumedSince = reading.at;
  } else if (wasStanding) {
    state.startedAt = reading.at;
  }
}

/**
 * Follows since when something asks for a speed, and dates a start just seen by it. `slot` is the program's slot
 * that holds the reading, where the program asks.
 */
export function trackDue(
  state: ControlState,
  { reading, gap }: Step,
  dueRpm: number,
  slot: ProgramSlot | undefined,
): void {
  const lastAt = state.at;
  if (!(dueRpm > 0)) {
    state.dueSince = null;
    return;
  }
  if (state.dueSince === null || !state.seen) {
    const edgeSeen = state.seen && !gap && slot !== undefined && slot.from > lastAt;
    state.dueSince = edgeSeen ? slot.from : reading.at;
  }
  const justStarted = state.startedAt === reading.at && !gap && state.seen;
  if (justStarted && state.dueSince >= lastAt) state.startedAt = state.dueSince;
}
