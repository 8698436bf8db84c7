/** From what the primed watts of a speed are known. */
export type LoadBasis = 'band' | 'prime' | 'scaled' | 'model' | 'none';

/** What the watts say of the load, for the rules. */
export type LoadFacts = {
  running: boolean;
  /** When this run from standstill began, ms; the first reading where the start was not seen. 0 while standing. */
  startedAt: number;
  startSeen: boolean;
  /** When the prime of this start is over, ms; the start itself where there is no prime. */
  primeEndsAt: number;
  /** Watts and speed smoothed over half a minute at one speed. */
  watts: number;
  /** What the watts should be with a full wet end at this speed; 0 with basis `none`. */
  primedWatts: number;
  basis: LoadBasis;
  /** Watts over primed watts; NaN where that is not known. */
  ratio: number;
  /** Below this ratio the wet end moves air. */
  unloadedBelow: number;
  /** This run has carried load for twenty seconds at one time. */
  primedOnce: boolean;
  /** Has load now; undefined = not judged (off, ramp, or still learning). */
  primed: boolean | undefined;
  /** This very reading shows no load; smoothed watts, and `primed`, take some readings to tell. */
  dry: boolean;
  /** Seconds from start to load; 0 until primed. */
  primeSeconds: number;
  /** Seconds for which this start was seen without load, the least that its prime took; 0 until primed. */
  dryForSeconds: number;
  /** Tries to prime that ended without load, this one left out, and when the first of them began. */
  failedTries: number;
  firstTryAt: number;
  /** Standard deviation of the watts over the last minutes as a share of their mean; 0 while too few. */
  raggedness: number;
  /**
   * At the fastest settled speed of this start before there was load: the speed (rpm), its watts and how ragged they
   * were. The slower the pump, the less its watts tell of the water. 0 before.
   */
  triedRpm: number;
  triedWatts: number;
  tryRaggedness: number;
  /** The same share as learnt from the band's spread; 0 while not learnt. */
  usualRaggedness: number;
  /** This start caught load for a moment and lost it again. */
  caught: boolean;
  /** What a full wet end should draw at a speed, W; 0 where that is not known. */
  wattsAt: (rpm: number) => number;
  /** How long the pump stood before this start, s; 0 unknown. */
  stoodSeconds: number;
};
