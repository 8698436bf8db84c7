import type { RunFlow } from './create-run-fold.ts';
import type { Run } from './run.ts';

/**
 * The flow at any speed as the runs of that time knew it: gallons for each turn of the shaft, since without static
 * head flow goes with speed. Runs without a known volume or without load tell nothing; where none does the flow is
 * unknown, and a shaft that stands moves none.
 *
 * @example flowOfRuns(stored)(1700) // { gpm: 27.2, sigmaShare: 0.08 }
 */
export function flowOfRuns(runs: readonly Run[]): (rpm: number) => RunFlow {
  let [gallons, sigma, rpmMinutes] = [0, 0, 0];
  for (const run of runs) {
    if (run.gallons === undefined || !(run.gallons > 0) || run.flags.includes('unprimed')) continue;
    gallons += run.gallons;
    sigma += run.gallonsSigma ?? 0;
    rpmMinutes += (run.meanRpm * run.coveredMs) / 60_000;
  }
  const gpmPerRpm = rpmMinutes > 0 ? gallons / rpmMinutes : Number.NaN;
  const sigmaShare = gallons > 0 ? sigma / gallons : 0;
  return (rpm) => ({ gpm: gpmPerRpm * rpm, sigmaShare });
}
