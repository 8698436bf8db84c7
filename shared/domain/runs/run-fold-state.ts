import type { Source } from '../readings/reading.ts';
import type { Run, RunFlag } from './run.ts';
import type { RunSums } from './run-sums.ts';

/** The run that is open, as control saw it when it opened. Its sums leave out a departure that may become a run. */
export type OpenRun = RunSums & {
  from: number;
  decisionSource: Source;
  decisionRpm: number;
  dueSource: Source;
  dueRpm: number;
  closedInputs: number;
  activeInput: number;
  reported: Source | null;
  /** The ramp of this run is over; `firstRpm` is the speed at which it was, then the mean takes over. */
  settled: boolean;
  firstRpm: number;
  firstWatts: number;
  flags: RunFlag[];
};

/** A stretch off the open run's mean, not yet long enough to be a run. `holdWattMs` = what the run before it gains by holding its watts across the edge. */
export type Departure = RunSums & { since: number; firstWatts: number; holdWattMs: number };

/** What the run fold remembers between readings: plain JSON. */
export type RunFoldState = {
  at: number;
  rpm: number;
  watts: number;
  /** Flow and one sigma as a share of it; below 0 = unknown. */
  gpm: number;
  sigmaShare: number;
  open: OpenRun | null;
  departure: Departure | null;
  finished: Run[];
  /** Whether the open run changed since it was last taken. */
  changed: boolean;
};

export function freshRunFoldState(): RunFoldState {
  return { at: 0, rpm: 0, watts: 0, gpm: -1, sigmaShare: 0, open: null, departure: null, finished: [], changed: false };
}

/** A saved state read back from JSON; undefined where its shape is not this version's, so that the fold starts afresh. */
export function parseRunFoldState(saved: unknown): RunFoldState | undefined {
  if (typeof saved !== 'object' || saved === null) return undefined;
  const given: Record<string, unknown> = { ...saved };
  const { at, rpm, watts, gpm, open, departure, finished, changed } = given;
  const numbers = [at, rpm, watts, gpm ?? -1].every((value) => Number.isFinite(value));
  const stretches = [open, departure].every((value) => value === null || holdsSums(value));
  const fits = numbers && stretches && Array.isArray(finished) && typeof changed === 'boolean';
  return fits ? copyRunFoldState(given as RunFoldState) : undefined;
}

function holdsSums(value: unknown): boolean {
  if (typeof value !== 'object' || value === null) return false;
  const sums: Record<string, unknown> = { ...value };
  return ['wattMs', 'rpmMs', 'coveredMs', 'settledRpmMs', 'settledMs', 'gallons', 'gallonsMs'].every((name) =>
    Number.isFinite(sums[name]),
  );
}

/** A stretch that was saved before volumes had a sigma gets one. */
const withSigma = <Stretch extends RunSums>(stretch: Stretch): Stretch => ({
  ...stretch,
  gallonsSigma: stretch.gallonsSigma ?? 0,
});

/** A copy that shares nothing which the fold writes to. */
export function copyRunFoldState(state: RunFoldState): RunFoldState {
  const { open, departure, finished } = state;
  return {
    ...state,
    gpm: state.gpm ?? -1,
    sigmaShare: state.sigmaShare ?? 0,
    open: open && { ...withSigma(open), flags: [...open.flags] },
    departure: departure && withSigma(departure),
    finished: [...finished],
  };
}
