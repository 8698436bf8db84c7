import { speedTolerance } from '../control/speed-tolerance.ts';
import type { Reading } from '../readings/reading.ts';
import { addInterval } from './add-interval.ts';
import type { Departure, OpenRun, RunFoldState } from './run-fold-state.ts';
import { addSums, emptySums, settledMean } from './run-sums.ts';

/** A speed off the mean for this long is a run of its own, ms. */
const DEPARTURE_MS = 60_000;
/** Within a departure the speed is settled once it moved under 20 rpm, or from 30 s on, like a ramp. */
const SETTLED_STEP_RPM = 20;
const SETTLED_AFTER_MS = 30_000;

/** Adds the interval to the open run, or to a departure from it; answers a departure that has lasted long enough. */
export function followDeparture(
  state: RunFoldState,
  open: OpenRun,
  reading: Reading,
  gpm: number,
  sigmaShare: number,
): Departure | undefined {
  const { departure } = state;
  const out = open.settled && isOff(reading.rpm, settledMean(open) ?? open.firstRpm);
  if (departure === null) {
    addInterval(state, open, reading, gpm, sigmaShare, open.settled && !out);
    if (out) state.departure = depart(state, reading);
    return undefined;
  }
  const settled =
    Math.abs(reading.rpm - state.rpm) < SETTLED_STEP_RPM || state.at - departure.since >= SETTLED_AFTER_MS;
  addInterval(state, departure, reading, gpm, sigmaShare, settled && out);
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
