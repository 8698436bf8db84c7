import type { RunFoldState } from './run-fold-state.ts';
import type { RunSums } from './run-sums.ts';

/** The reading, or the mere instant, that an interval ends with. */
export type IntervalEnd = {
  readonly at: number;
  readonly rpm: number;
  readonly watts: number;
  /** Flow and one sigma as a share of it; below 0 = unknown. */
  readonly gpm: number;
  readonly sigmaShare: number;
};

/** The trapezoid from the last reading to `end`; with the last values at the end too it is the value held. */
export function addInterval(state: RunFoldState, sums: RunSums, end: IntervalEnd, settled = false): void {
  const ms = end.at - state.at;
  const meanRpm = (state.rpm + end.rpm) / 2;
  sums.wattMs += ((state.watts + end.watts) / 2) * ms;
  sums.rpmMs += meanRpm * ms;
  sums.coveredMs += ms;
  if (settled) {
    sums.settledRpmMs += meanRpm * ms;
    sums.settledMs += ms;
  }
  if (!(state.gpm >= 0 && end.gpm >= 0)) return;
  const gallons = (((state.gpm + end.gpm) / 2) * ms) / 60_000;
  sums.gallons += gallons;
  sums.gallonsSigma += gallons * end.sigmaShare;
  sums.gallonsMs += ms;
}
