import type { RunFoldState } from './run-fold-state.ts';
import type { RunSums } from './run-sums.ts';

/** The reading, or the mere instant, that an interval ends with. */
export type IntervalEnd = {
  readonly at: number;
  readonly rpm: number;
  readonly watts: number;
};

/**
 * The trapezoid from the last reading to `end`; with the last values at the end too it is the value held. `gpm` is the
 * flow there, below 0 or NaN = unknown, and `sigmaShare` one sigma as a share of it.
 */
export function addInterval(
  state: RunFoldState,
  sums: RunSums,
  end: IntervalEnd,
  gpm: number,
  sigmaShare: number,
  settled: boolean,
): void {
  const ms = end.at - state.at;
  const meanRpm = (state.rpm + end.rpm) / 2;
  sums.wattMs += ((state.watts + end.watts) / 2) * ms;
  sums.rpmMs += meanRpm * ms;
  sums.coveredMs += ms;
  if (settled) {
    sums.settledRpmMs += meanRpm * ms;
    sums.settledMs += ms;
  }
  if (!(state.gpm >= 0 && gpm >= 0)) return;
  const gallons = (((state.gpm + gpm) / 2) * ms) / 60_000;
  sums.gallons += gallons;
  sums.gallonsSigma += gallons * sigmaShare;
  sums.gallonsMs += ms;
}

/** The last values held until an instant. */
export function holdUntil(state: RunFoldState, sums: RunSums, at: number): void {
  addInterval(state, sums, { at, rpm: state.rpm, watts: state.watts }, state.gpm, state.sigmaShare, false);
}
