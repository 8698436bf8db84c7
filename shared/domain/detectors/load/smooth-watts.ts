import { speedTolerance } from '#shared/domain/control/speed-tolerance.ts';
import type { LoadState } from './load-state.ts';

/** Watts are smoothed over this long at one speed, ms. */
const MEAN_MS = 30_000;
/** The watts are looked at this far apart to see how they move, ms. */
const LOOK_MS = 20_000;
const KEPT_MOVES = 10;
const FEWEST_MOVES = 6;
/** The two largest moves are left out: load that goes and comes back once is a step, and no raggedness. */
const LEFT_OUT = 2;
/** Mean of the smaller four fifths of the moves between independent normal values, in their standard deviations. */
const MEAN_MOVE = 0.79;

/** Takes one reading into the smoothed watts; another speed, or a gap, begins anew. */
export function smoothWatts(state: LoadState, at: number, rpm: number, watts: number, elapsedMs: number): void {
  if (state.samples === 0 || Math.abs(rpm - state.smoothRpm) > speedTolerance(state.smoothRpm)) {
    forgetSmoothing(state);
    state.smoothRpm = rpm;
    state.smoothWatts = watts;
    state.samples = 1;
    return;
  }
  const gain = Math.max(elapsedMs / (MEAN_MS + elapsedMs), 1 / (state.samples + 1));
  state.smoothWatts += gain * (watts - state.smoothWatts);
  state.smoothRpm += gain * (rpm - state.smoothRpm);
  state.samples += 1;
  if (at - state.lookedAt >= LOOK_MS) look(state, at, watts);
}

function look(state: LoadState, at: number, watts: number): void {
  if (state.lookedAt !== 0) {
    state.moves.push(Math.round(Math.abs(watts - state.lookedWatts)));
    if (state.moves.length > KEPT_MOVES) state.moves.shift();
  }
  state.lookedAt = at;
  state.lookedWatts = Math.round(watts);
  state.raggedness = raggednessOf(state);
}

/** Standard deviation of the watts as a share of their mean, steps left out; 0 while too few were seen. */
function raggednessOf({ moves, smoothWatts: mean }: LoadState): number {
  if (moves.length < FEWEST_MOVES || mean <= 0) return 0;
  let [sum, largest, second] = [0, 0, 0];
  for (const move of moves) {
    sum += move;
    if (move > largest) [largest, second] = [move, largest];
    else if (move > second) second = move;
  }
  const share = (sum - largest - second) / (moves.length - LEFT_OUT) / MEAN_MOVE / mean;
  return Math.round(share * 1000) / 1000;
}

export function forgetSmoothing(state: LoadState): void {
  state.samples = 0;
  state.lookedAt = 0;
  state.raggedness = 0;
  if (state.moves.length > 0) state.moves = [];
}
