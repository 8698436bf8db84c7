import type { Run } from '#shared/contract/http/runs.ts';

/** A run of a pump under its program at 1,700 rpm, from 0 to 1000 ms unless told otherwise. */
export const makeRun = (change: Partial<Run> = {}): Run => ({
  from: 0,
  to: 1000,
  source: 'program',
  expectedSource: 'program',
  closedInputs: 0,
  activeInput: 0,
  expectedRpm: 1700,
  meanRpm: 1700,
  meanWatts: 300,
  wattHours: 1,
  coveredMs: 1000,
  gallons: null,
  flags: [],
  ...change,
});
