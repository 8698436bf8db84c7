import type { ControlAnswer } from '../control/control-answer.ts';

export type ControlCopy = { -readonly [Key in keyof ControlAnswer]: ControlAnswer[Key] };

/** Every rule looks at the answer several times, and plain fields are read much faster than control's live view. */
export function copyAnswer(into: ControlCopy, answer: ControlAnswer): void {
  into.at = answer.at;
  into.decision = answer.decision;
  into.due = answer.due;
  into.winningInput = answer.winningInput;
  into.rpm = answer.rpm;
  into.offExpected = answer.offExpected;
  into.standing = answer.standing;
  into.rampOver = answer.rampOver;
  into.sinceStartSeconds = answer.sinceStartSeconds;
  into.sinceChangeSeconds = answer.sinceChangeSeconds;
  into.primeEndsAt = answer.primeEndsAt;
  into.programEdgeBefore = answer.programEdgeBefore;
  into.programEdgeAfter = answer.programEdgeAfter;
  into.motorClockOffsetMinutes = answer.motorClockOffsetMinutes;
  into.motorClockKnown = answer.motorClockKnown;
}
