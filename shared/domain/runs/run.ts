import type { RunSource } from '../readings/reading.ts';

/**
 * Marks on a run: `off-expected` (settled away from the expected speed), `unprimed`, `ramp-only` (over before the ramp
 * was), `late-corrected` (worked out again after late readings).
 */
export type RunFlag = 'off-expected' | 'unprimed' | 'ramp-only' | 'late-corrected';

/**
 * A stretch of time with one source, one input mask and one settled speed. `to` is undefined while it is open.
 * Half-open in device time (ms). `wattHours` covers `coveredMs` of it; a gap is a `no-data` run and covers nothing.
 */
export type Run = {
  from: number;
  to: number | undefined;
  source: RunSource;
  expectedSource: RunSource;
  closedInputs: number;
  /** The input that wins, 0 = none. */
  activeInput: number;
  expectedRpm: number;
  meanRpm: number;
  meanWatts: number;
  wattHours: number;
  coveredMs: number;
  /** US gallons; undefined where the readings cannot tell. */
  gallons: number | undefined;
  /** One standard deviation of the gallons; undefined where they are. */
  gallonsSigma?: number | undefined;
  flags: RunFlag[];
};
