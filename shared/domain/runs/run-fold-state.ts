import type { RunSource } from '../readings/reading.ts';
import type { Run, RunFlag } from './run.ts';

/** Sums over a stretch between readings: watt- and rpm-milliseconds, US gallons, and how much of the time they cover. */
export type RunSums = {
  wattMs: number;
  coveredMs: number;
  rpmMs: number;
  settledRpmMs: number;
  settledMs: number;
  gallons: number;
  gallonsMs: number;
};

/** The run that is open. Its sums leave out the stretch that may yet become a run of its own (`departure`). */
export type OpenRun = RunSums & {
  from: number;
  source: RunSource;
  expectedSource: RunSource;
  decisionSource: RunSource;
  closedInputs: number;
  activeInput: number;
  expectedRpm: number;
  /** The last settled speed, before there is a settled stretch to take the mean of. */
  firstRpm: number;
  firstWatts: number;
  settled: boolean;
  flags: RunFlag[];
};

/** A stretch off the open run's mean, not yet 60 s long. `correction` = watt-ms to add to the run before it, held across the edge. */
export type Departure = RunSums & { since: number; correction: number };

/** What the run fold remembers between readings: plain JSON. */
export type RunFoldState = {
  seen: boolean;
  at: number;
  rpm: number;
  watts: number;
  gpm: number | null;
  open: OpenRun | null;
  departure: Departure | null;
  finished: Run[];
  /** Whether the open run changed since it was last taken. */
  changed: boolean;
};
