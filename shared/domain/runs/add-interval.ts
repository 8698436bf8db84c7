import type { RunFoldState } from './run-fold-state.ts';
import type { RunSums } from './run-sums.ts';

/** The reading, or the mere instant, that an interval ends with. */
export type IntervalEnd = {
  readonly at: number;
  readonly rpm: number;
  readonly watts: number;
  readonly gpm: number | undefined;
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
  if (state.gpm === null || end.gpm === undefined) return;
  sums.gallons += (((state.gpm + end.gpm) / 2) * ms) / 60_000;
  sums.gallonsMs += ms;
}
