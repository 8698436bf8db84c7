import { findRoot } from './find-root.ts';
import { WIDEST_SIGMA_SHARE } from './flow-estimate.ts';
import { feetPerGpmAt, headAt, speedRatio, type WetEndCurve } from './wet-end-curve.ts';

export type FlowFromHead =
  | { readonly kind: 'flow'; readonly gpm: number; readonly sigmaGpm: number }
  | {
      readonly kind: 'cannot-tell';
      readonly because: 'standing' | 'above-shut-off' | 'beyond-curve' | 'flat-curve' | 'not-finite';
    };

/**
 * The flow (gpm) at which a pump gives a head (ft, with its sigma) at a speed (rpm): the head curve read backwards. It
 * cannot tell where the head lies off the curve, or the curve is so flat that the gauges decide nothing.
 *
 * @example flowFromHead(curve, 3450, 71, 2.3) // { kind: 'flow', gpm: 48.5, sigmaGpm: 7 }
 */
export function flowFromHead(curve: WetEndCurve, rpm: number, feet: number, sigmaFeet: number): FlowFromHead {
  const ratio = speedRatio(curve, rpm);
  if (![rpm, feet, sigmaFeet].every(Number.isFinite) || sigmaFeet < 0)
    return { kind: 'cannot-tell', because: 'not-finite' };
  if (ratio === undefined) return { kind: 'cannot-tell', because: 'standing' };
  if (feet > (headAt(curve, rpm, 0) ?? 0)) return { kind: 'cannot-tell', because: 'above-shut-off' };
  const gpm = findRoot((flow) => (headAt(curve, rpm, flow) ?? Number.NaN) - feet, 0, curve.endGpm * ratio);
  if (gpm === undefined) return { kind: 'cannot-tell', because: 'beyond-curve' };
  const sigmaGpm = Math.hypot(sigmaFeet, curve.headSigmaFeet * ratio ** 2) / Math.abs(feetPerGpmAt(curve, ratio, gpm));
  if (!(sigmaGpm <= WIDEST_SIGMA_SHARE * curve.largestGpm * ratio))
    return { kind: 'cannot-tell', because: 'flat-curve' };
  return { kind: 'flow', gpm, sigmaGpm };
}
