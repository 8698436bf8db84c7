import type { Reading } from '../readings/reading.ts';
import { type OffsetSpan, offsetSpanAt } from '../time/zone-offset.ts';
import type { ControlAnswer } from './control-answer.ts';
import {
  type ControlState,
  freshControlState,
  parseControlState,
  type SavedControl,
  saveControlState,
} from './control-state.ts';
import { createJudgement } from './judge-situation.ts';
import { followMotorClock, motorClockOffset } from './motor-clock-offset.ts';
import type { PumpContext } from './pump-context.ts';
import { STANDSTILL_RPM } from './speed-tolerance.ts';
import { freezeMayTurn, keypadMoved } from './track-claims.ts';

/** The ramp is over when rpm moved under 20 between two readings, or after 30 s. */
const RAMP_STEP_RPM = 20;
const RAMP_MS = 30_000;
/** Two readings of one event can come together; only readings this far apart say that the speed settled, ms. */
const SETTLED_APART_MS = 1000;
/** Holds no instant. */
const NO_SPAN: OffsetSpan = { from: 0, to: 0, offsetMinutes: 0 };
/** More intervals than this without a reading are a gap. */
export const GAP_INTERVALS = 3;

/** Control of one pump: takes readings one by one, in order of time, and answers what the motor should be doing. */
export type Control = {
  /** Takes the next reading in; answers the same object every time. One not after the last, or that is no number, changes nothing. */
  push(reading: Reading): ControlAnswer;
  /** The answer after the last reading; undefined before the first. */
  answer(): ControlAnswer | undefined;
  /** What was learnt of the motor's clock, minutes ahead of wall time; it counts where the motor says nothing itself. */
  setMotorClockOffset(minutes: number | undefined): void;
  /** The state as plain JSON, for `createControl` to go on from. */
  save(): SavedControl;
};

/**
 * Control that keeps what one pump's answer rests on: start and prime, keypad, timed run, freeze hour and the motor
 * clock's offset. It works the answer out anew only when something that matters changes. `saved` is what `save`
 * gave, also under changed settings; what cannot be read back starts afresh.
 *
 * @example const control = createControl(context); control.push(reading).due.rpm // 1700
 */
export function createControl(context: PumpContext, saved?: unknown): Control {
  const state = parseControlState(saved) ?? freshControlState();
  const judgement = createJudgement(context, state);
  const gapMs = GAP_INTERVALS * context.intervalSeconds * 1000;
  const { freeze } = context.settings;
  const answer = liveAnswer(state, judgement);
  let span = NO_SPAN;

  function clockMoved(reading: Reading): boolean {
    if (reading.motorClockMinute === undefined) return false;
    if (!(reading.at >= span.from && reading.at < span.to)) span = offsetSpanAt(context.zone, reading.at) ?? NO_SPAN;
    return followMotorClock(state, reading.motorClockMinute, reading.at, span.offsetMinutes);
  }

  function mattersToAnswer(reading: Reading, standing: boolean): boolean {
    return (
      reading.at >= judgement.validUntil ||
      reading.closedInputs !== state.closedInputs ||
      (reading.reportedSource ?? null) !== state.reported ||
      (reading.fault ?? null) !== state.fault ||
      standing !== state.standing ||
      state.assumedSince !== null ||
      keypadMoved(state, reading) ||
      freezeMayTurn(state, reading, freeze)
    );
  }

  function push(reading: Reading): ControlAnswer {
    if (!Number.isFinite(reading.at + reading.rpm) || (state.seen && reading.at <= state.at)) return answer;
    const standing = reading.rpm <= STANDSTILL_RPM;
    const gap = !state.seen || reading.at - state.at > gapMs;
    if (clockMoved(reading) || gap || mattersToAnswer(reading, standing)) judgement.renew({ reading, standing, gap });
    if (!state.rampOver) state.rampOver = hasSettled(state, reading, gap);
    if (state.assumedSince !== null) judgement.review(reading);
    state.seen = true;
    state.at = reading.at;
    state.rpm = reading.rpm;
    return answer;
  }

  return {
    push,
    answer: () => (state.seen ? answer : undefined),
    setMotorClockOffset(minutes) {
      const learnt = minutes !== undefined && Number.isFinite(minutes) ? minutes : null;
      if (learnt === state.learntOffset) return;
      state.learntOffset = learnt;
      judgement.expire();
    },
    save: () => saveControlState(state),
  };
}

function hasSettled(state: ControlState, reading: Reading, gap: boolean): boolean {
  if (reading.at - state.changedAt >= RAMP_MS) return true;
  if (gap || state.at < state.changedAt || reading.at - state.at < SETTLED_APART_MS) return false;
  return Math.abs(reading.rpm - state.rpm) < RAMP_STEP_RPM;
}

/** A view of the state: nothing is copied until someone looks. */
function liveAnswer(state: ControlState, judgement: ReturnType<typeof createJudgement>): ControlAnswer {
  return {
    get at() {
      return state.at;
    },
    get rpm() {
      return state.rpm;
    },
    get standing() {
      return state.standing;
    },
    get rampOver() {
      return state.rampOver;
    },
    get decision() {
      return judgement.decision;
    },
    get due() {
      return judgement.due;
    },
    get winningInput() {
      return judgement.winner;
    },
    get offExpected() {
      return Math.abs(state.rpm - judgement.due.rpm) > judgement.toleranceRpm;
    },
    get sinceStartSeconds() {
      return state.startedAt === null ? undefined : (state.at - state.startedAt) / 1000;
    },
    get sinceChangeSeconds() {
      return (state.at - state.changedAt) / 1000;
    },
    get primeEndsAt() {
      return judgement.primeEndsAt;
    },
    get programEdgeBefore() {
      return judgement.edges.before;
    },
    get programEdgeAfter() {
      return judgement.edges.after;
    },
    get motorClockOffsetMinutes() {
      return motorClockOffset(state);
    },
    get motorClockKnown() {
      return state.saidOffset !== null || state.learntOffset !== null;
    },
  };
}
