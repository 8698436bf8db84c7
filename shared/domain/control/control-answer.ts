import type { Decision } from './decision.ts';

/**
 * What control answers after a reading. One object a pump, changed in place by every reading: read it at once and
 * copy what you keep.
 */
export type ControlAnswer = {
  /** Device time of the reading it answers for, ms. */
  readonly at: number;
  /** What the motor obeys, a believed keypad stop or fault included (then 0 rpm). */
  readonly decision: Decision;
  /** What is expected of it: what would be due without a keypad stop or fault. The same object as `decision` otherwise. */
  readonly due: Decision;
  /** The closed input that wins, 0 = none. */
  readonly winningInput: number;
  /** The reading's shaft speed, rpm, and whether it lies off what is due by more than max(40 rpm, 2 %). */
  readonly rpm: number;
  readonly offExpected: boolean;
  readonly standing: boolean;
  /** The ramp is over: rpm moved under 20 between two readings since the last change, or 30 s have passed. */
  readonly rampOver: boolean;
  /** Since the start from standstill, s; undefined while standing and where the start was not seen. */
  readonly sinceStartSeconds: number | undefined;
  /** Since source, mask, expected speed or start last changed, s. */
  readonly sinceChangeSeconds: number;
  /** When the prime of this start is over, ms; undefined where none is due. */
  readonly primeEndsAt: number | undefined;
  /** The program's edges before and after, ms; undefined where there is none within days. */
  readonly programEdgeBefore: number | undefined;
  readonly programEdgeAfter: number | undefined;
  /** How far the motor's own clock is ahead of wall time, minutes, and whether that is known or only assumed. */
  readonly motorClockOffsetMinutes: number;
  readonly motorClockKnown: boolean;
};
