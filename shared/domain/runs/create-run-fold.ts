import type { ControlAnswer } from '../control/control-answer.ts';
import { GAP_INTERVALS } from '../control/create-control.ts';
import type { PumpContext } from '../control/pump-context.ts';
import { speedTolerance } from '../control/speed-tolerance.ts';
import type { Reading } from '../readings/reading.ts';
import { describeGap, describeRun } from './describe-run.ts';
import type { Run, RunFlag } from './run.ts';
import {
  copyRunFoldState,
  type Departure,
  freshRunFoldState,
  type OpenRun,
  parseRunFoldState,
  type RunFoldState,
} from './run-fold-state.ts';
import { addSums, emptySums, type RunSums, settledMean } from './run-sums.ts';

/** A speed off the mean for this long is a run of its own, ms. */
const DEPARTURE_MS = 60_000;
/** Within a departure the speed is settled once it moved under 20 rpm, or from 30 s on, like a ramp. */
const SETTLED_STEP_RPM = 20;
const SETTLED_AFTER_MS = 30_000;

export type RunFold = {
  /**
   * Takes the next reading in with control's answer to it and, where it is known, the flow (US gpm). One not after
   * the last, or that is no number, changes nothing.
   */
  push(reading: Reading, control: ControlAnswer, gpm?: number | undefined): void;
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

  function advance(open: OpenRun, reading: Reading, control: ControlAnswer, gpm: number | undefined): void {
    if (reading.at - state.at > gapMs) {
      passGap(open, reading.at);
      state.open = openRun(reading.at, reading, control);
    } else if (isAnotherRun(open, reading, control)) {
      addInterval(state, state.departure ?? open, {
        at: reading.at,
        rpm: state.rpm,
        watts: state.watts,
        gpm: state.gpm ?? undefined,
      });
      finish(reading.at);
      state.open = openRun(reading.at, reading, control);
    } else {
      const parted = stay(state, open, reading, gpm);
      if (parted !== undefined) {
        open.wattMs += parted.holdWattMs;
        finish(parted.since);
        state.open = partedRun(parted, open, reading);
      }
    }
  }

  function push(reading: Reading, control: ControlAnswer, gpm?: number | undefined): void {
    if (!Number.isFinite(reading.at + reading.rpm + reading.watts) || !(state.open === null || reading.at > state.at))
      return;
    if (state.open === null) state.open = openRun(reading.at, reading, control);
    else advance(state.open, reading, control, gpm);
    const { open } = state;
    if (open !== null && !open.settled && control.rampOver && state.departure === null) {
      open.settled = true;
      open.firstRpm = reading.rpm;
    }
    state.at = reading.at;
    state.rpm = reading.rpm;
    state.watts = reading.watts;
    state.gpm = gpm ?? null;
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
      addInterval(state, state.departure ?? open, {
        at,
        rpm: state.rpm,
        watts: state.watts,
        gpm: state.gpm ?? undefined,
      });
      finish(at);
    },
    save: () => copyRunFoldState(state),
  };
}

function openRun(from: number, reading: Reading, { decision, due, winningInput }: ControlAnswer): OpenRun {
  return {
    ...emptySums(),
    from,
    decisionSource: decision.source,
    decisionRpm: decision.rpm,
    dueSource: due.source,
    dueRpm: due.rpm,
    closedInputs: reading.closedInputs,
    activeInput: winningInput,
    reported: reading.reportedSource ?? null,
    settled: false,
    firstRpm: reading.rpm,
    firstWatts: reading.watts,
    flags: [],
  };
}

/** The departure that lasted: the same answer of control, another speed. */
function partedRun(departure: Departure, before: OpenRun, reading: Reading): OpenRun {
  const { since, firstWatts, holdWattMs: _, ...sums } = departure;
  return { ...before, ...sums, from: since, settled: true, firstRpm: reading.rpm, firstWatts, flags: [] };
}

function isAnotherRun(open: OpenRun, reading: Reading, { decision, due }: ControlAnswer): boolean {
  return (
    reading.closedInputs !== open.closedInputs ||
    decision.source !== open.decisionSource ||
    due.source !== open.dueSource ||
    (due.rpm !== open.dueRpm && due.source !== 'keypad')
  );
}

/** Adds the interval to the open run, or to a departure from it; answers a departure that has lasted long enough. */
function stay(state: RunFoldState, open: OpenRun, reading: Reading, gpm: number | undefined): Departure | undefined {
  const { departure } = state;
  const end = { at: reading.at, rpm: reading.rpm, watts: reading.watts, gpm };
  const out = open.settled && isOff(reading.rpm, settledMean(open) ?? open.firstRpm);
  if (departure === null) {
    addInterval(state, open, end, open.settled && !out);
    if (out) state.departure = depart(state, reading);
    return undefined;
  }
  const settled =
    Math.abs(reading.rpm - state.rpm) < SETTLED_STEP_RPM || state.at - departure.since >= SETTLED_AFTER_MS;
  addInterval(state, departure, end, settled && out);
  if (!out) {
    const { settledRpmMs, settledMs } = open;
    addSums(open, departure);
    // What was off the mean must not move it.
    open.settledRpmMs = settledRpmMs;
    open.settledMs = settledMs;
    state.departure = null;
    return undefined;
  }
  if (reading.at - departure.since < DEPARTURE_MS) return undefined;
  state.departure = null;
  return departure;
}

function isOff(rpm: number, meanRpm: number): boolean {
  return Math.abs(rpm - meanRpm) > speedTolerance(meanRpm);
}

function depart(state: RunFoldState, reading: Reading): Departure {
  const holdWattMs = ((state.watts - reading.watts) / 2) * (reading.at - state.at);
  return { ...emptySums(), since: reading.at, firstWatts: reading.watts, holdWattMs };
}

type IntervalEnd = {
  readonly at: number;
  readonly rpm: number;
  readonly watts: number;
  readonly gpm: number | undefined;
};

/** The trapezoid from the last reading to `end`; with the last values at the end too it is the value held. */
function addInterval(state: RunFoldState, sums: RunSums, end: IntervalEnd, settled = false): void {
  const ms = end.at - state.at;
  const meanRpm = (state.rpm + end.rpm) / 2;
  sums.wattMs += ((state.watts + end.watts) / 2) * ms;
  sums.rpmMs += meanRpm * ms;
  sums.coveredMs += ms;
  if (settled) {
    sums.settledRpmMs += meanRpm * ms;
    sums.settledMs += ms;
  }
  if (state.gpm === null || end.gpm === undefined) return;
  sums.gallons += (((state.gpm + end.gpm) / 2) * ms) / 60_000;
  sums.gallonsMs += ms;
}
