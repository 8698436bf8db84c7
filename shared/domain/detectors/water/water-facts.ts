/** What is known of the water that one pump moves, for runs, screens and the rules. */
export type WaterFacts = {
  /** Flow at this reading, gpm: 0 standing or without load; NaN where the readings cannot tell. */
  gpm: number;
  /** One standard deviation of the flow, as a share of it. */
  sigmaShare: number;
  /** Flow at this reading if the system were as commissioned, gpm; NaN where that is not known. */
  cleanGpm: number;
  /** What this speed usually draws at this setting of the valves, W; 0 while that is being learnt. */
  usualWatts: number;
  /** The most it drew for days, since the filter was last clean, W; 0 while unknown. */
  cleanWatts: number;
  /** Spread of the usual watts as a share of them. */
  usualSpread: number;
  /** Watts over the usual ones; NaN while the speed has not settled or is being learnt. */
  ratio: number;
  /** Fall of the flow at this speed against its clean one, as the median of three days; NaN where it cannot be told. */
  dropOfDays: number;
  /** The same by the last ten minutes. */
  dropNow: number;
  /** Fall of the watts at this speed below those of a clean filter, by three days and by ten minutes; NaN likewise. */
  wattsDropOfDays: number;
  wattsDropNow: number;
  /** How much of the fall came from one day to the next at most, as a share of it. */
  dropAtOnce: number;
  /** First local day (since 1970) of those that `dropOfDays` is about. */
  dropSinceDay: number;
  /** Watts at the last whole day at this speed over the usual ones; NaN without one. */
  ratioYesterday: number;
};

export const restingWater = (): WaterFacts => ({
  gpm: Number.NaN,
  sigmaShare: 0,
  cleanGpm: Number.NaN,
  usualWatts: 0,
  cleanWatts: 0,
  usualSpread: 0,
  ratio: Number.NaN,
  dropOfDays: Number.NaN,
  dropNow: Number.NaN,
  wattsDropOfDays: Number.NaN,
  wattsDropNow: Number.NaN,
  dropAtOnce: 0,
  dropSinceDay: 0,
  ratioYesterday: Number.NaN,
});
