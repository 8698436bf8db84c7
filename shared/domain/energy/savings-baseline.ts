import { horsepowerToWatts } from '#shared/units/power.ts';

/**
 * What the pump used before, one sigma beside it. `clamped`: the old motor's watts, measured before it left.
 * `nameplate`: reckoned from its plate. `logged`: its watts recorded over days.
 */
export type Baseline = {
  readonly kind: 'clamped' | 'nameplate' | 'logged';
  readonly watts: number;
  readonly sigmaWatts: number;
  /** What is held equal: the hours it ran, or the water it moved (then with the old flow). */
  readonly basis:
    | { readonly kind: 'same-hours' }
    | { readonly kind: 'same-volume'; readonly gpm: number; readonly sigmaGpm: number };
};

/** Efficiency of an old single-speed motor at its load, and one sigma of the watts so reckoned; common practice. */
const OLD_EFFICIENCY = 0.75;
const NAMEPLATE_SIGMA_SHARE = 0.15;

/**
 * The watts of an old single-speed motor from its plate, as if it ran at its total horsepower (plate × service factor):
 * an estimate with 15 % as one sigma. undefined unless horsepower is above 0 up to 10 and service factor 1 to 2.
 *
 * @example nameplateWatts(1.5, 1.1) // { watts: 1640.5, sigmaWatts: 246.1 }
 * Source: total horsepower = nameplate × service factor, darrenspoolservices.com/title20.
 */
export function nameplateWatts(
  horsepower: number,
  serviceFactor: number,
): { readonly watts: number; readonly sigmaWatts: number } | undefined {
  if (!(horsepower > 0 && horsepower <= 10) || !(serviceFactor >= 1 && serviceFactor <= 2)) return undefined;
  const watts = horsepowerToWatts(horsepower * serviceFactor) / OLD_EFFICIENCY;
  return { watts, sigmaWatts: NAMEPLATE_SIGMA_SHARE * watts };
}
