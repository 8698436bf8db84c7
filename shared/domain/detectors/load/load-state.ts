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
  variance: number;
  samples: number;
  smoothSince: number;
  loadedSince: number;
  unloadedSince: number;
  /** Speed and watts when the load was last judged. */
  judgedRpm: number;
  judgedWatts: number;
  primedOnce: boolean;
  /** Load came for a moment and went; and it went for good. */
  brief: boolean;
  caught: boolean;
  /** 0 no, 1 yes, 2 not judged. */
  primed: number;
  primeSeconds: number;
  /** The last reading of this start that was judged, and carried no load; 0 none. */
  lastUnloadedAt: number;
  /** How ragged the watts of this start last were before it had load. */
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
  variance: 0,
  samples: 0,
  smoothSince: 0,
  loadedSince: 0,
  unloadedSince: 0,
  judgedRpm: 0,
  judgedWatts: 0,
  primedOnce: false,
  brief: false,
  caught: false,
  primed: 2,
  primeSeconds: 0,
  lastUnloadedAt: 0,
  tryRaggedness: 0,
  lately: 1,
  failedTries: 0,
  firstTryAt: 0,
  learningRpm: 0,
  learningSeconds: 0,
  learningDay: 0,
  learning: {},
});
