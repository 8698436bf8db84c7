import type { LoadState } from './load-state.ts';
import { AIR_SHARE } from './primed-watts.ts';
import { forgetSmoothing } from './smooth-watts.ts';

/** Between these, s, a try counts once it lasted its prime time. */
export type TryLimits = { readonly shortestTrySeconds: number; readonly longestTrySeconds: number };

/** Load, or its lack, counts once it lasted this long, ms. */
const SETTLED_MS = 20_000;
/** Load that lasted less than this after a start was no prime, ms. */
const CAUGHT_MS = 60_000;
/** Load that only wavers about the limit was not lost. */
const CLEARLY_BELOW = 0.1;
/**
 * A pump that was seen without load needs this much more to count as loaded: at a low speed a shut valve draws nearly
 * as much as an open one.
 */
const CLEARLY_ABOVE = 1.18;
/** What is left in the wet end gives load for a moment in any start, ms. */
const FIRST_WATER_MS = 60_000;
/** Load that came nearly, as a share of the primed watts, and watts of air after it: the water is not enough. */
const CAUGHT_SHARE = 0.6;
/** So long after a prime a start is still judged, ms. */
const JUST_STARTED_MS = 900_000;
/** Speeds within this share are one. */
const SAME_SPEED = 0.98;
/** A failed try is forgotten when no start follows within a day. */
const TRY_MEMORY_MS = 86_400_000;

/** A start from standstill (`seen`), or the first reading of a pump that was already turning. */
export function startTry(state: LoadState, at: number, seen: boolean): void {
  state.stoodSeconds = seen && state.stoppedAt !== 0 ? (at - state.stoppedAt) / 1000 : 0;
  if (state.firstTryAt !== 0 && at - state.firstTryAt > TRY_MEMORY_MS) forgetTries(state);
  state.running = true;
  state.startedAt = at;
  state.startSeen = seen;
  state.loadedSince = 0;
  state.unloadedSince = 0;
  state.primedOnce = false;
  state.caught = false;
  state.brief = false;
  state.bestShare = 0;
  state.sure = false;
  state.primed = 2;
  state.primeSeconds = 0;
  state.lastUnloadedAt = 0;
  state.triedRpm = 0;
  state.triedWatts = 0;
  state.tryRaggedness = 0;
  forgetSmoothing(state);
}

/** The shaft stands. A try that was judged and never carried load counts as failed. */
export function endTry(state: LoadState, at: number, primeSeconds: number, limits: TryLimits): void {
  if (!state.running) {
    if (state.stoppedAt === 0) state.stoppedAt = at;
    return;
  }
  const { shortestTrySeconds, longestTrySeconds } = limits;
  const enough = Math.min(longestTrySeconds, Math.max(shortestTrySeconds, primeSeconds)) * 1000;
  if (!state.primedOnce && state.unloadedSince !== 0 && at - state.startedAt >= enough) {
    state.failedTries += 1;
    if (state.firstTryAt === 0) state.firstTryAt = state.startedAt;
  }
  state.running = false;
  state.stoppedAt = at;
  state.primed = 2;
  state.loadedSince = 0;
  state.unloadedSince = 0;
}

/** A basket fills and a filter clogs over minutes and hours: load that fell so slowly is no lost prime. */
const LATELY_MS = 20 * 60_000;
const LEAST_LATELY = 0.72;

const hasHadLoad = ({ primedOnce, sure }: LoadState): boolean => primedOnce && sure;
const latelyShare = ({ lately }: LoadState): number => Math.min(1, Math.max(LEAST_LATELY, lately));

/**
 * The share of its usual load below which a wet end moves air. While it runs, of the load it had lately, where that has
 * fallen slowly, but never under half; a start that never had load has lost none slowly.
 */
export function unloadedShare(state: LoadState, share: number): number {
  return hasHadLoad(state) ? share * latelyShare(state) : share;
}

/**
 * The share below which there is no load now. A pump that was just seen without load must show clearly more to count as
 * loaded; at a start that clear margin shrinks with the load it had before, so that a dirty filter is no failed prime.
 */
function limitShare(state: LoadState, unloadedBelow: number): number {
  if (state.primed !== 0) return unloadedBelow;
  const clearly = unloadedBelow * CLEARLY_ABOVE;
  return hasHadLoad(state) ? clearly : Math.max(unloadedBelow, clearly * latelyShare(state));
}

/** Follows the load while there is one; elapsed ms. */
export function followLately(state: LoadState, ratio: number, elapsedMs: number): void {
  if (state.primed !== 1 || !(ratio > 0)) return;
  const lately = state.lately + (elapsedMs / (elapsedMs + LATELY_MS)) * (ratio - state.lately);
  state.lately = Math.round(lately * 10_000) / 10_000;
}

/** Share of the primed watts after the ramp, below which there is no load, and whether both are this speed's own. */
export type LoadLook = {
  readonly at: number;
  readonly ratio: number;
  readonly unloadedBelow: number;
  readonly sure: boolean;
};

/** Judges one reading after the ramp; answers whether this start has just been seen to prime. */
export function judgeLoad(state: LoadState, look: LoadLook): boolean {
  const { at, ratio, unloadedBelow } = look;
  if (!(ratio >= 0)) {
    state.primed = 2;
    return false;
  }
  if (ratio < limitShare(state, unloadedBelow)) {
    loseLoad(state, look);
    return false;
  }
  state.unloadedSince = 0;
  if (state.loadedSince === 0) state.loadedSince = at;
  if (at - state.loadedSince < SETTLED_MS) return false;
  state.primed = 1;
  if (look.sure) {
    state.sure = true;
    state.bestShare = 0;
  } else if (!state.sure) noteBest(state, ratio);
  if (state.primedOnce) return false;
  state.primedOnce = true;
  state.primeSeconds = Math.max(0, (state.loadedSince - state.startedAt) / 1000);
  forgetTries(state);
  return true;
}

function loseLoad(state: LoadState, look: LoadLook): void {
  const { at, ratio, unloadedBelow } = look;
  // Load that came for a moment and went is no prime.
  if (state.loadedSince !== 0) state.brief = at - state.loadedSince < CAUGHT_MS;
  const justStarted = at - Math.max(state.startedAt, state.primeEndsAt) < JUST_STARTED_MS;
  if (state.brief && justStarted && ratio < unloadedBelow - CLEARLY_BELOW) {
    state.caught = true;
    state.primedOnce = false;
  }
  state.loadedSince = 0;
  if (state.unloadedSince === 0) state.unloadedSince = at;
  if (at - state.unloadedSince >= SETTLED_MS) {
    state.primed = 0;
    // A model took the watts of no flow for load; what this speed usually draws tells better.
    if (look.sure && !state.sure && justStarted) state.primedOnce = false;
  }
  if (!state.primedOnce) {
    state.lastUnloadedAt = at;
    noteTry(state, look);
  }
}

/** Whether these watts (W) alone are those of no load. */
export function isDry(
  state: LoadState,
  watts: number,
  { unloadedBelow, primedWatts }: { readonly unloadedBelow: number; readonly primedWatts: number },
): boolean {
  return watts < limitShare(state, unloadedBelow) * primedWatts;
}

function noteBest(state: LoadState, ratio: number): void {
  state.bestShare = Math.max(state.bestShare, Math.round(ratio * 100) / 100);
}

/** Remembers what the fastest speed of a start without load looked like: nothing tells its cause better. */
function noteTry(state: LoadState, { at, ratio }: LoadLook): void {
  if (at - state.startedAt >= FIRST_WATER_MS) noteBest(state, ratio);
  if (state.bestShare >= CAUGHT_SHARE && ratio < AIR_SHARE) state.caught = true;
  const isFastest = state.smoothRpm >= state.triedRpm * SAME_SPEED;
  if (state.raggedness > 0 && (isFastest || state.tryRaggedness === 0)) state.tryRaggedness = state.raggedness;
  if (!isFastest) return;
  state.triedRpm = Math.round(state.smoothRpm);
  state.triedWatts = Math.round(state.smoothWatts);
}

function forgetTries(state: LoadState): void {
  state.failedTries = 0;
  state.firstTryAt = 0;
}
