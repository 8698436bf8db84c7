import type { ControlAnswer } from '../control/control-answer.ts';
import { GAP_INTERVALS } from '../control/create-control.ts';
import type { PumpContext } from '../control/pump-context.ts';
import type { Reading } from '../readings/reading.ts';
import { holdUntil } from './add-interval.ts';
import { describeGap, describeRun } from './describe-run.ts';
import { followDeparture } from './follow-departure.ts';
import { isAnotherRun, openRun, partedRun } from './open-run.ts';
import type { Run, RunFlag } from './run.ts';
import {
  copyRunFoldState,
  freshRunFoldState,
  type OpenRun,
  parseRunFoldState,
  type RunFoldState,
} from './run-fold-state.ts';

/** Flow at a reading, US gpm, below 0 or NaN = unknown, with one sigma as a share of it. */
export type RunFlow = { readonly gpm: number; readonly sigmaShare: number };

const UNKNOWN_FLOW: RunFlow = { gpm: -1, sigmaShare: 0 };

export type RunFold = {
  /**
   * Takes the next reading in with control's answer to it and, where it is known, the flow. One not after the last, or that is no number, changes nothing.
   */
  push(reading: Reading, control: ControlAnswer, flow?: RunFlow): void;
  /** Marks the open run. */
  flag(flag: RunFlag): void;
  /** A copy of the open run as it stands; undefined before the first reading. */
  current(): Run | undefined;
  /** Every run that opened, changed or closed since the last call, in its last state, once per `from`, in order. */
  take(): Run[];
  /** Closes the open run at an instant at or after the last reading, ms; a gap before it is a `no-data` run. */
  close(at: number): void;
  /** The state as plain JSON, for `createRunFold` to go on from. */
  save(): RunFoldState;
};

/**
 * The fold that turns one pump's readings into runs, in order of time. A run opens when source, mask or expected
 * speed changes, when the speed leaves its mean by max(40 rpm, 2 %) for 60 s (then back to when it left), and after
 * a gap of over three intervals, which is a `no-data` run. Energy is the trapezoid inside a run, held across a
 * change, nothing over a gap. The result does not depend on when runs are taken or the state saved.
 *
 * @example const fold = createRunFold(context); fold.push(reading, control.push(reading)); fold.take()
 */
export function createRunFold(context: PumpContext, saved?: unknown): RunFold {
  const state = parseRunFoldState(saved) ?? freshRunFoldState();
  const gapMs = GAP_INTERVALS * context.intervalSeconds * 1000;
  const { settings } = context;

  function finish(to: number): void {
    const { open } = state;
    if (open !== null && to > open.from) state.finished.push(describeRun(open, state.departure, to, settings));
    state.departure = null;
    state.open = null;
  }

  function passGap(open: OpenRun, to: number): void {
    finish(state.at);
    state.finished.push(describeGap(open, state.at, to));
  }

  function advance(open: OpenRun, reading: Reading, control: ControlAnswer, { gpm, sigmaShare }: RunFlow): void {
    if (reading.at - state.at > gapMs) {
      passGap(open, reading.at);
      state.open = openRun(reading.at, reading, control);
    } else if (isAnotherRun(open, reading, control)) {
      holdUntil(state, state.departure ?? open, reading.at);
      finish(reading.at);
      state.open = openRun(reading.at, reading, control);
    } else {
      const parted = followDeparture(state, open, reading, gpm, sigmaShare);
      if (parted !== undefined) {
        open.wattMs += parted.holdWattMs;
        finish(parted.since);
        state.open = partedRun(parted, open, reading);
      }
    }
  }

  function push(reading: Reading, control: ControlAnswer, flow: RunFlow = UNKNOWN_FLOW): void {
    if (!Number.isFinite(reading.at + reading.rpm + reading.watts) || !(state.open === null || reading.at > state.at))
      return;
    if (state.open === null) state.open = openRun(reading.at, reading, control);
    else advance(state.open, reading, control, flow);
    const { open } = state;
    if (open !== null && !open.settled && control.rampOver && state.departure === null) {
      open.settled = true;
      open.firstRpm = reading.rpm;
    }
    state.at = reading.at;
    state.rpm = reading.rpm;
    state.watts = reading.watts;
    state.gpm = flow.gpm >= 0 ? flow.gpm : -1;
    state.sigmaShare = flow.sigmaShare;
    state.changed = true;
  }

  return {
    push,
    flag(flag) {
      if (state.open === null || state.open.flags.includes(flag)) return;
      state.open.flags.push(flag);
      state.changed = true;
    },
    current: () => (state.open === null ? undefined : describeRun(state.open, state.departure, undefined, settings)),
    take() {
      const runs = state.finished;
      state.finished = [];
      if (state.open !== null && state.changed)
        runs.push(describeRun(state.open, state.departure, undefined, settings));
      state.changed = false;
      return runs;
    },
    close(at) {
      const { open } = state;
      if (open === null || !Number.isFinite(at) || at < state.at) return;
      if (at - state.at > gapMs) return passGap(open, at);
      holdUntil(state, state.departure ?? open, at);
      finish(at);
    },
    save: () => copyRunFoldState(state),
  };
}
