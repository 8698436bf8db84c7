import type { ControlAnswer } from '#shared/domain/control/control-answer.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { type LearnedBands, SAME_SPEED_SHARE } from './learned-bands.ts';
import type { LoadFacts } from './load-facts.ts';
import type { LoadState } from './load-state.ts';
import { addToSketch } from './watts-sketch.ts';

/** Nothing is learnt in the first minutes after a start, nor in the first minute at a speed. */
const AFTER_START_MS = 300_000;
const AFTER_CHANGE_SECONDS = 60;
/** A stretch becomes part of its band this often, s. */
const KEEP_AFTER_SECONDS = 1800;
/** Watts this far off what is known of the speed are no part of its usual band. */
const FARTHEST_SHARE = 0.25;
const FARTHEST_ROUGH_SHARE = 0.5;
const DAY_MS = 86_400_000;

/** Adds one reading to the stretch being learnt; answers whether a band changed. */
export function learnReading(
  state: LoadState,
  bands: LearnedBands,
  reading: Reading,
  control: ControlAnswer,
  elapsedMs: number,
  facts: LoadFacts,
): boolean {
  const steady = control.rampOver && control.sinceChangeSeconds >= AFTER_CHANGE_SECONDS;
  if (!steady || reading.at - state.startedAt < AFTER_START_MS || state.primed === 0) return false;
  let changed = false;
  const day = Math.floor(reading.at / DAY_MS);
  const moved = Math.abs(reading.rpm - state.learningRpm) > state.learningRpm * SAME_SPEED_SHARE;
  if (
    state.learningSeconds > 0 &&
    (moved || day !== state.learningDay || state.learningSeconds >= KEEP_AFTER_SECONDS)
  ) {
    changed = keepLearning(state, bands);
  }
  if (!isUsual(facts)) return changed;
  if (state.learningSeconds === 0) {
    state.learningRpm = reading.rpm;
    state.learningDay = day;
  }
  const seconds = Math.round(elapsedMs / 1000);
  addToSketch(state.learning, reading.watts, seconds);
  state.learningSeconds += seconds;
  return changed;
}

function isUsual({ ratio, basis }: LoadFacts): boolean {
  if (basis === 'none') return true;
  return Math.abs(ratio - 1) <= (basis === 'band' ? FARTHEST_SHARE : FARTHEST_ROUGH_SHARE);
}

/** Makes the stretch part of its band; answers whether there was one. */
export function keepLearning(state: LoadState, bands: LearnedBands): boolean {
  if (state.learningSeconds <= 0) return false;
  bands.add(state.learningRpm, state.learning, state.learningDay, state.startedAt);
  discardLearning(state);
  return true;
}

export function discardLearning(state: LoadState): void {
  state.learningSeconds = 0;
  state.learning = {};
}
