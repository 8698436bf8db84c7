/**
 * The hydraulic side of a pump at its reference speed. Head and power are written about the best point in the
 * share x = flow ÷ best flow: head falls with a power of x, shaft power starts at its shut-off share and turns over
 * past the best point. Both are forms of this simulator's own, no fitted polynomials.
 */
export type WetEnd = {
  readonly referenceRpm: number;
  readonly shutOffFeet: number;
  readonly bestGpm: number;
  /** Head at the best flow as a share of that at shut-off. */
  readonly bestHeadShare: number;
  /** How sharply the head falls; 2 would be a parabola. */
  readonly headExponent: number;
  readonly bestEfficiency: number;
  /** Shaft power at shut-off as a share of that at the best flow: 0.44 is called typical, more at high specific speed. */
  readonly shutOffPowerShare: number;
  /** Where the power peaks, as a share of the best flow. */
  readonly powerPeakShare: number;
  /** Shaft power with air in the volute, as a share of that at the best flow. */
  readonly dryPowerShare: number;
};

/** Watts of hydraulic power per gpm and foot: 745.7 W per hp over 3956 gpm·ft per hp. */
export const WATTS_PER_GPM_FOOT = 745.7 / 3956;

/** Head, ft, at a flow and speed. Past run-out it goes on falling below zero, so that a solver always has a bracket. */
export function headFeet(wetEnd: WetEnd, gpm: number, rpm: number): number {
  const speed = rpm / wetEnd.referenceRpm;
  if (speed <= 0) return 0;
  const share = gpm / (wetEnd.bestGpm * speed);
  const fall = (1 - wetEnd.bestHeadShare) * share ** wetEnd.headExponent;
  return wetEnd.shutOffFeet * speed * speed * (1 - fall);
}

/** Shaft power, W, of a wet end full of water. */
export function shaftWatts(wetEnd: WetEnd, gpm: number, rpm: number): number {
  const speed = rpm / wetEnd.referenceRpm;
  if (speed <= 0) return 0;
  const share = gpm / (wetEnd.bestGpm * speed);
  // x(1 + d)/(1 + d·x³) is 1 at x = 1 and peaks where x³ = 1/(2d).
  const droop = 0.5 / wetEnd.powerPeakShare ** 3;
  const rise = (share * (1 + droop)) / (1 + droop * share ** 3);
  const { shutOffPowerShare } = wetEnd;
  return bestShaftWatts(wetEnd) * speed ** 3 * (shutOffPowerShare + (1 - shutOffPowerShare) * rise);
}

/** Shaft power, W, of a wet end that churns air: windage grows a little less than the cube, seal drag with the speed. */
export function dryShaftWatts(wetEnd: WetEnd, rpm: number): number {
  const speed = rpm / wetEnd.referenceRpm;
  return speed <= 0 ? 0 : bestShaftWatts(wetEnd) * wetEnd.dryPowerShare * (0.05 * speed + 0.95 * speed ** 2.8);
}

/** Shaft power, W, at the best point and the reference speed. */
export function bestShaftWatts(wetEnd: WetEnd): number {
  const hydraulic = wetEnd.bestGpm * wetEnd.shutOffFeet * wetEnd.bestHeadShare * WATTS_PER_GPM_FOOT;
  return hydraulic / wetEnd.bestEfficiency;
}
