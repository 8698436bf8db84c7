import type { Equipment } from '../control/pump-context.ts';
import type { Run } from '../runs/run.ts';
import { isTurning, shareOfRun } from './run-share.ts';

/**
 * How long equipment was called for, and of that how long it had its minimum flow, had less, or nobody can tell. Only
 * time that the readings cover; a gap is none of these.
 */
export type MinimumFlowTime = {
  readonly dueMs: number;
  readonly enoughMs: number;
  readonly shortMs: number;
  readonly unknownMs: number;
};

/** What equipment asks: a flow (gpm), and the input whose clock feeds it; without one it is due whenever the pump turns. */
export type FlowNeed = Pick<Equipment, 'input' | 'minimumGpm'>;

/** A skimmer skims from about this flow, gpm; common practice. */
export const SKIMMING_GPM = 25;

const isDue = (run: Run, need: FlowNeed): boolean =>
  need.input === undefined ? isTurning(run) : (run.closedInputs & (1 << (need.input - 1))) !== 0;

/**
 * Adds up how long equipment (heater, cell, skimmer) had its minimum flow between two instants (ms). A run's flow is
 * its gallons over its covered time; a shaft that stands gives none. All zero for a need without a minimum above 0 gpm.
 *
 * @example sumMinimumFlowTime(runs, { input: 2, minimumGpm: 30 }, dayFrom, dayTo) // { dueMs: 14_400_000, enoughMs: 10_800_000, … }
 */
export function sumMinimumFlowTime(runs: readonly Run[], need: FlowNeed, from: number, to: number): MinimumFlowTime {
  let [dueMs, enoughMs, shortMs, unknownMs] = [0, 0, 0, 0];
  const least = need.minimumGpm;
  if (least === undefined || !(least > 0)) return { dueMs, enoughMs, shortMs, unknownMs };
  for (const run of runs) {
    const part = shareOfRun(run, from, to);
    if (part === undefined || run.source === 'no-data' || !isDue(run, need)) continue;
    dueMs += part.milliseconds;
    const gpm = isTurning(run) ? ((run.gallons ?? Number.NaN) / run.coveredMs) * 60_000 : 0;
    if (!Number.isFinite(gpm) || gpm < 0) unknownMs += part.milliseconds;
    else if (gpm >= least) enoughMs += part.milliseconds;
    else shortMs += part.milliseconds;
  }
  return { dueMs, enoughMs, shortMs, unknownMs };
}
