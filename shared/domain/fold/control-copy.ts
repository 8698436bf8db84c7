import type { ControlAnswer } from '../control/control-answer.ts';
import { fitsSpeed, STANDSTILL_RPM } from '../control/speed-tolerance.ts';
import type { Reading } from '../readings/reading.ts';

export type ControlCopy = { -readonly [Key in keyof ControlAnswer]: ControlAnswer[Key] };

/**
 * Every rule looks at the answer several times, and plain fields are read much faster than control's live view. Most
 * readings change nothing but the speed and the time: control makes a new decision whenever anything else does.
 */
export function followAnswer(into: ControlCopy, answer: ControlAnswer, reading: Reading, elapsedMs: number): void {
  if (answer.decision !== into.decision || answer.due !== into.due) {
    copyAnswer(into, answer);
    return;
  }
  into.at = reading.at;
  into.rpm = reading.rpm;
  into.offExpected = !fitsSpeed(reading.rpm, into.due.rpm);
  into.standing = reading.rpm <= STANDSTILL_RPM;
  into.rampOver = answer.rampOver;
  if (into.sinceStartSeconds !== undefined) into.sinceStartSeconds += elapsedMs / 1000;
  into.sinceChangeSeconds += elapsedMs / 1000;
}

/** Copies every field. */
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
