import type { WetEndPoint } from '../control/pump-context.ts';
import { accepted, type Outcome, type Refusal, refused } from '../refusal/refusal.ts';
import { findRoot } from './find-root.ts';
import { fitDriveLoss } from './fit-drive-loss.ts';
import { fitPowers, type PolynomialFit } from './least-squares.ts';
import { derivative, evaluatePolynomial, type Polynomial, turningPoints } from './polynomial.ts';
import type { WetEndCurve } from './wet-end-curve.ts';
import { checkSheet, type SheetFault, type WetEndSheet } from './wet-end-sheet.ts';

export type WetEndFault = SheetFault | 'watts-not-a-curve' | 'low-speed-watts-under-cube' | 'flow-beyond-curve';

/** A pump as built keeps to its printed curve within about this, one sigma (from memory: half of ISO 9906 grade 2B). */
const BUILT_TO_CURVE_SHARE = 0.03;
/** How far past the last point a fitted curve is used; common practice. */
const BEYOND_POINTS = 1.25;
/** Higher powers are taken only while they leave clearly less over, and never below this share of the mean watts. */
const WORTHWHILE = 0.8;
const CLOSE_ENOUGH_SHARE = 0.002;

const flows = (points: readonly WetEndPoint[]): number[] => points.map((point) => point.gpm);

const fallsOver = (head: Polynomial, largestGpm: number): boolean => {
  const slope = derivative(head);
  const rounding = 1e-9 * Math.abs(head[0] ?? 0);
  return (
    evaluatePolynomial(slope, 0) * largestGpm <= rounding &&
    evaluatePolynomial(slope, largestGpm) * largestGpm <= rounding &&
    evaluatePolynomial(head, largestGpm) < evaluatePolynomial(head, 0)
  );
};

/** Quadratic where the quadratic falls; else flat at shut-off, else a straight line: whichever first falls all along. */
function fitHead(points: readonly WetEndPoint[], largestGpm: number): PolynomialFit | undefined {
  const feet = points.map((point) => point.feet);
  return [
    [0, 1, 2],
    [0, 2],
    [0, 1],
  ]
    .map((powers) => fitPowers(flows(points), feet, powers))
    .find((fit) => fit !== undefined && fallsOver(fit.coefficients, largestGpm));
}

/** The lowest degree up to the cube that follows the points, with a point to spare, so that it does not chase them. */
function fitPower(points: readonly WetEndPoint[], standbyWatts: number): PolynomialFit | undefined {
  const watts = points.map((point) => point.watts - standbyWatts);
  const mean = watts.reduce((sum, value) => sum + value, 0) / watts.length;
  let best = fitPowers(flows(points), watts, [0, 1]);
  for (const powers of [
    [0, 1, 2],
    [0, 1, 2, 3],
  ]) {
    if (best === undefined || best.sigma <= CLOSE_ENOUGH_SHARE * mean || points.length <= powers.length) break;
    const next = fitPowers(flows(points), watts, powers);
    if (next !== undefined && next.sigma < WORTHWHILE * best.sigma) best = next;
  }
  return best;
}

/** How far the curves hold: past the last point, but not past no head, nor to where either turns back. */
function findEnd(head: Polynomial, power: Polynomial, largestGpm: number): number {
  const furthest = BEYOND_POINTS * largestGpm;
  const noHead = findRoot((gpm) => evaluatePolynomial(head, gpm), largestGpm, furthest) ?? furthest;
  const noPower = findRoot((gpm) => evaluatePolynomial(power, gpm), largestGpm, furthest) ?? furthest;
  const turns = turningPoints(head).filter((gpm) => gpm > largestGpm);
  return Math.max(largestGpm, Math.min(furthest, noHead, noPower, ...turns));
}

const isPositiveOver = (polynomial: Polynomial, largestGpm: number): boolean =>
  [0, largestGpm, ...turningPoints(polynomial).filter((gpm) => gpm > 0 && gpm < largestGpm)].every(
    (gpm) => evaluatePolynomial(polynomial, gpm) > 0,
  );

const curveFault = (reason: WetEndFault, field: string, allowed: string): Refusal<WetEndFault> => ({
  reason,
  field,
  allowed,
});

/**
 * Fits a wet end from its sheet: quadratic head and at most cubic power by least squares over the points at the
 * reference speed, and what drive and motor lose beyond the cube law where low-speed points exist (else none, with a
 * wider sigma). Refuses with every reason at once: fewer than four points, head that rises past shut-off, duplicate
 * flows, numbers that are not finite or negative, watts that the water alone would exceed.
 *
 * @example fitWetEnd({ referenceRpm: 3450, points: [], standbyWatts: 8 })
 * // { ok: false, refusals: [{ reason: 'fewer-than-four-points', field: 'points', allowed: 'at least four …' }] }
 * Source: affinity laws and curve shapes, HI Data Tool 02_pump-curves; degrees by common practice.
 */
export function fitWetEnd(sheet: WetEndSheet): Outcome<WetEndCurve, WetEndFault> {
  const faults = checkSheet(sheet);
  if (faults.length > 0) return refused(faults);
  const largestGpm = Math.max(...flows(sheet.points));
  const head = fitHead(sheet.points, largestGpm);
  if (head === undefined)
    return refused([curveFault('head-rises', 'points', 'heads that fall from shut-off to the last flow')]);
  const power = fitPower(sheet.points, sheet.standbyWatts);
  if (power === undefined || !isPositiveOver(power.coefficients, largestGpm))
    return refused([curveFault('watts-not-a-curve', 'points', 'watts above standby at every flow, on a smooth curve')]);

  const meanWatts =
    sheet.points.reduce((sum, point) => sum + point.watts - sheet.standbyWatts, 0) / sheet.points.length;
  const curve: WetEndCurve = {
    referenceRpm: sheet.referenceRpm,
    head: head.coefficients,
    power: power.coefficients,
    standbyWatts: sheet.standbyWatts,
    lossWatts: 0,
    largestGpm,
    endGpm: findEnd(head.coefficients, power.coefficients, largestGpm),
    headSigmaFeet: Math.hypot(head.sigma, BUILT_TO_CURVE_SHARE * (head.coefficients[0] ?? 0)),
    powerSigmaShare: Math.hypot(power.sigma / meanWatts, BUILT_TO_CURVE_SHARE),
    lossSigmaWatts: 0,
  };
  const loss = fitDriveLoss(curve, meanWatts, sheet.lowSpeedPoints ?? []);
  return loss.ok ? accepted({ ...curve, ...loss.value }) : loss;
}
