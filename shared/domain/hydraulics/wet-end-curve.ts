import { derivative, evaluatePolynomial, type Polynomial } from './polynomial.ts';

/**
 * A wet end with its motor, as fitted: everything at `referenceRpm`, scaled to any other speed by the affinity laws.
 *
 * `head` is feet over gpm; `power` is watts over gpm without `standbyWatts`. `lossWatts` is what drive and motor lose
 * beyond the cube law: at r = rpm ÷ reference they draw lossWatts·(r − r³) more. `largestGpm` is the last measured
 * flow, `endGpm` how far the curve may be trusted beyond it. The sigmas are one standard deviation of the curve itself.
 */
export type WetEndCurve = {
  readonly referenceRpm: number;
  readonly head: Polynomial;
  readonly power: Polynomial;
  readonly standbyWatts: number;
  readonly lossWatts: number;
  readonly largestGpm: number;
  readonly endGpm: number;
  readonly headSigmaFeet: number;
  readonly powerSigmaShare: number;
  readonly lossSigmaWatts: number;
};

/**
 * Speed as a share of the reference; undefined unless rpm is finite and above 0.
 *
 * @example speedRatio({ ...curve, referenceRpm: 3450 }, 1725) // 0.5
 */
export const speedRatio = (curve: WetEndCurve, rpm: number): number | undefined =>
  Number.isFinite(rpm) && rpm > 0 ? rpm / curve.referenceRpm : undefined;

/**
 * What drive and motor lose beyond the cube law, per watt of `lossWatts`: nothing at standstill and at reference.
 *
 * @example lossShape(0.5) // 0.375
 */
export const lossShape = (ratio: number): number => ratio - ratio ** 3;

/**
 * Head in feet at a speed (rpm above 0) and flow (gpm from 0), by the affinity laws: r²·h(Q ÷ r). undefined for bad
 * input. Negative beyond the flow at which the pump gives no head.
 *
 * @example headAt(curve, 1725, 0) // a quarter of the shut-off head at 3450 rpm
 */
export function headAt(curve: WetEndCurve, rpm: number, gpm: number): number | undefined {
  const ratio = speedRatio(curve, rpm);
  if (ratio === undefined || !Number.isFinite(gpm) || gpm < 0) return undefined;
  return ratio ** 2 * evaluatePolynomial(curve.head, gpm / ratio);
}

/**
 * Watts at the motor's line terminals at a speed (rpm from 0) and flow (gpm from 0):
 * standby + (N ÷ Nref)³·P(Q·Nref ÷ N) + loss(N). Standby alone at standstill; undefined for bad input.
 *
 * @example wattsAt(curve, 0, 0) // curve.standbyWatts
 */
export function wattsAt(curve: WetEndCurve, rpm: number, gpm: number): number | undefined {
  if (rpm === 0) return curve.standbyWatts;
  const ratio = speedRatio(curve, rpm);
  if (ratio === undefined || !Number.isFinite(gpm) || gpm < 0) return undefined;
  const moved = ratio ** 3 * evaluatePolynomial(curve.power, gpm / ratio);
  return curve.standbyWatts + moved + curve.lossWatts * lossShape(ratio);
}

/** Watts per gpm at a speed and flow: how much a litre more shows on the meter. */
export const wattsPerGpmAt = (curve: WetEndCurve, ratio: number, gpm: number): number =>
  ratio ** 2 * evaluatePolynomial(derivative(curve.power), gpm / ratio);

/** Feet per gpm at a speed and flow; negative on a falling curve. */
export const feetPerGpmAt = (curve: WetEndCurve, ratio: number, gpm: number): number =>
  ratio * evaluatePolynomial(derivative(curve.head), gpm / ratio);
