import type { ControlAnswer } from '../control/control-answer.ts';
import type { Decision } from '../control/decision.ts';
import type { Reading } from '../readings/reading.ts';

const NOTHING_DUE: Decision = {
  source: 'off',
  rpm: 0,
  until: undefined,
  lockedBy: undefined,
  because: { kind: 'no-data' },
};

/** What control says before any reading. */
export const CONTROL_BEFORE_READINGS: ControlAnswer = {
  at: 0,
  decision: NOTHING_DUE,
  due: NOTHING_DUE,
  winningInput: 0,
  rpm: 0,
  offExpected: false,
  standing: true,
  rampOver: false,
  sinceStartSeconds: undefined,
  sinceChangeSeconds: 0,
  primeEndsAt: undefined,
  programEdgeBefore: undefined,
  programEdgeAfter: undefined,
  motorClockOffsetMinutes: 0,
  motorClockKnown: false,
};

export const READING_BEFORE_READINGS: Reading = { at: 0, rpm: 0, closedInputs: 0, activeInput: 0, watts: 0 };
