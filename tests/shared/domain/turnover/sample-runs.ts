import type { Run } from '#shared/domain/runs/run.ts';

/** A run of the program: 1700 rpm at 200 W and 30 gpm, unless told otherwise. */
export function sampleRun(from: number, to: number, change: Partial<Run> = {}): Run {
  const hours = (to - from) / 3_600_000;
  return {
    from,
    to,
    source: 'program',
    expectedSource: 'program',
    closedInputs: 0,
    activeInput: 0,
    expectedRpm: 1700,
    meanRpm: 1700,
    meanWatts: 200,
    wattHours: 200 * hours,
    coveredMs: to - from,
    gallons: 1800 * hours,
    flags: [],
    ...change,
  };
}
