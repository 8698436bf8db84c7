/** Sums over a stretch between readings: watt-, rpm- and gallon-weighted ms, and how much of the time they cover. */
export type RunSums = {
  wattMs: number;
  rpmMs: number;
  coveredMs: number;
  /** Shaft speed after the ramp only. */
  settledRpmMs: number;
  settledMs: number;
  gallons: number;
  gallonsMs: number;
  /** One sigma of the gallons: the meter's error is the same all along, so that it adds up. */
  gallonsSigma: number;
};

export function emptySums(): RunSums {
  return {
    wattMs: 0,
    rpmMs: 0,
    coveredMs: 0,
    settledRpmMs: 0,
    settledMs: 0,
    gallons: 0,
    gallonsMs: 0,
    gallonsSigma: 0,
  };
}

/** Adds one stretch's sums to another's. */
export function addSums(into: RunSums, from: RunSums): void {
  into.wattMs += from.wattMs;
  into.rpmMs += from.rpmMs;
  into.coveredMs += from.coveredMs;
  into.settledRpmMs += from.settledRpmMs;
  into.settledMs += from.settledMs;
  into.gallons += from.gallons;
  into.gallonsMs += from.gallonsMs;
  into.gallonsSigma += from.gallonsSigma;
}

/** The mean speed of the settled part, rpm; undefined where nothing settled yet. */
export function settledMean({ settledMs, settledRpmMs }: RunSums): number | undefined {
  return settledMs > 0 ? settledRpmMs / settledMs : undefined;
}
