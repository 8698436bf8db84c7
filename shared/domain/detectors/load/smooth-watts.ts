import { speedTolerance } from '#shared/domain/control/speed-tolerance.ts';
import type { LoadState } from './load-state.ts';

/** Watts are smoothed over this long at one speed, and their spread over four times as long, ms. */
const MEAN_MS = 30_000;
const SPREAD_MS = 120_000;
/** Fewer readings than this say nothing about raggedness. */
const LEAST_SAMPLES = 12;

/** Takes one reading into the smoothed watts; another speed, or a gap, begins anew. */
export function smoothWatts(state: LoadState, at: number, rpm: number, watts: number, elapsedMs: number): void {
  if (state.samples === 0 || Math.abs(rpm - state.smoothRpm) > speedTolerance(state.smoothRpm)) {
    state.smoothRpm = rpm;
    state.smoothWatts = watts;
    state.variance = 0;
    state.samples = 1;
    state.smoothSince = at;
    return;
  }
  const away = watts - state.smoothWatts;
  const meanGain = Math.max(elapsedMs / (MEAN_MS + elapsedMs), 1 / (state.samples + 1));
  const spreadGain = Math.max(elapsedMs / (SPREAD_MS + elapsedMs), 1 / (state.samples + 1));
  state.smoothWatts += meanGain * away;
  state.smoothRpm += meanGain * (rpm - state.smoothRpm);
  state.variance += spreadGain * (away * away * (1 - meanGain) - state.variance);
  state.samples += 1;
}

/** Standard deviation of the watts as a share of their mean; 0 while there are too few. */
export function raggednessOf(state: LoadState): number {
  if (state.samples < LEAST_SAMPLES || state.smoothWatts <= 0) return 0;
  return Math.sqrt(Math.max(0, state.variance)) / state.smoothWatts;
}

export function forgetSmoothing(state: LoadState): void {
  state.samples = 0;
}
