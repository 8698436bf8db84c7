/** What the load tracker remembers between readings: times ms, 0 = not. Plain JSON. */
export type LoadState = {
  running: boolean;
  startedAt: number;
  startSeen: boolean;
  /** When the prime of this start is over. */
  primeEndsAt: number;
  stoppedAt: number;
  stoodSeconds: number;
  /** Smoothing at one speed. */
  smoothRpm: number;
  smoothWatts: number;
  samples: number;
  /** How far the watts moved from one look to the next, newest last; the last look, ms and W; what that comes to. */
  moves: number[];
  lookedAt: number;
  lookedWatts: number;
  raggedness: number;
  loadedSince: number;
  unloadedSince: number;
  primedOnce: boolean;
  /** Load came for a moment and went; and it went for good. */
  brief: boolean;
  /** The largest share of the primed watts that this start had, its first minute left out, before it had load. */
  bestShare: number;
  /** That there was load is known from this speed's own watts, not from a model or another speed. */
  sure: boolean;
  caught: boolean;
  /** 0 no, 1 yes, 2 not judged. */
  primed: number;
  primeSeconds: number;
  /** The last reading of this start that was judged, and carried no load; 0 none. */
  lastUnloadedAt: number;
  /** At the fastest settled speed of this start before it had load: the speed, its watts and how ragged they were. */
  triedRpm: number;
  triedWatts: number;
  tryRaggedness: number;
  /** Load over usual load of late, while it had load: 1 = as usual. */
  lately: number;
  failedTries: number;
  firstTryAt: number;
  /** The stretch being learnt, not yet part of a band. */
  learningRpm: number;
  learningSeconds: number;
  learningDay: number;
  learning: { [bin: number]: number };
};

export const restingLoad = (): LoadState => ({
  running: false,
  startedAt: 0,
  startSeen: false,
  primeEndsAt: 0,
  stoppedAt: 0,
  stoodSeconds: 0,
  smoothRpm: 0,
  smoothWatts: 0,
  samples: 0,
  moves: [],
  lookedAt: 0,
  lookedWatts: 0,
  raggedness: 0,
  loadedSince: 0,
  unloadedSince: 0,
  primedOnce: false,
  brief: false,
  bestShare: 0,
  sure: false,
  caught: false,
  primed: 2,
  primeSeconds: 0,
  lastUnloadedAt: 0,
  triedRpm: 0,
  triedWatts: 0,
  tryRaggedness: 0,
  lately: 1,
  failedTries: 0,
  firstTryAt: 0,
  learningRpm: 0,
  learningSeconds: 0,
  learningDay: 0,
  learning: {},
});
