import { evaluatePolynomial, turningPoints } from './polynomial.ts';
import type { WetEndCurve } from './wet-end-curve.ts';

/**
 * The flow (gpm) at a speed (rpm) after the watts moved by so much from those of a known flow: 0 where they fell to
 * those of no flow; undefined where the power curve is flat or turns over, and for bad input.
 */
export type FlowAfterChange = (rpm: number, knownGpm: number, changeWatts: number) => number | undefined;

/** A pump nearer than this to where its power turns over shows no change of flow in its watts. */
const RISING_SHARE = 0.97;
/** A third less flow must show in the watts by at least this share of them. */
const LEAST_FALL_SHARE = 0.045;
const STEPS = 128;

/**
 * Makes the reader of changes for one wet end. What meter and drive add before and after is the same and cancels, so
 * that a change of flow is known far better than the flow itself. By the affinity laws one table at the reference
 * speed serves all speeds: it is asked at every settled speed every few minutes, for thousands of pumps.
 *
 * @example createFlowAfterChange(curve)(3450, 60, -150) // 45
 * Source: affinity laws; the slope of power over flow, HI Data Tool 02_pump-curves.
 */
export function createFlowAfterChange(curve: WetEndCurve): FlowAfterChange {
  const top = Math.min(curve.endGpm, ...turningPoints(curve.power).filter((gpm) => gpm > 0));
  const table = Array.from({ length: STEPS + 1 }, (_, step) => evaluatePolynomial(curve.power, (step * top) / STEPS));
  const wattsOf = (gpm: number): number => {
    const place = (gpm / top) * STEPS;
    const left = Math.min(STEPS - 1, Math.floor(place));
    return interpolate(table, left, place - left);
  };
  const least = table[0] ?? 0;
  return (rpm, knownGpm, changeWatts) => {
    const ratio = rpm / curve.referenceRpm;
    const known = knownGpm / ratio;
    if (!(ratio > 0 && known > 0 && known <= RISING_SHARE * top) || !Number.isFinite(changeWatts)) return undefined;
    const before = wattsOf(known);
    if (before - wattsOf((2 / 3) * known) < LEAST_FALL_SHARE * (before + curve.standbyWatts)) return undefined;
    const after = before + changeWatts / ratio ** 3;
    if (after <= least) return 0;
    const right = table.findIndex((watts) => watts >= after);
    if (right < 1) return undefined;
    const [low = 0, high = 0] = [table[right - 1], table[right]];
    return ((right - 1 + (after - low) / (high - low)) / STEPS) * top * ratio;
  };
}

const interpolate = (table: readonly number[], left: number, share: number): number =>
  (table[left] ?? 0) * (1 - share) + (table[left + 1] ?? 0) * share;
