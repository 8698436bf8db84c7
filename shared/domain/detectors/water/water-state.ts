/** What the water tracker remembers between readings, but for the levels: the stretch in hand, and the system's k. */
export type WaterState = {
  wattMs: number;
  rpmMs: number;
  ms: number;
  /** The k of the system now, ft/gpm², when it was last measured, ms, and at which share of the reference speed. */
  k: number;
  kAt: number;
  kRatio: number;
  /** Of which commissioned k all of this was learnt. */
  commissionedK: number;
};

export const restingWaterState = (): WaterState => ({
  wattMs: 0,
  rpmMs: 0,
  ms: 0,
  k: 0,
  kAt: 0,
  kRatio: 0,
  commissionedK: 0,
});
