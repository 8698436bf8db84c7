import { findDutyPoint } from './duty-point.ts';
import { cannotTell, type FlowAnswer, refuseFlow } from './flow-estimate.ts';
import type { SystemEstimate } from './system-estimate.ts';
import { feetPerGpmAt, speedRatio, type WetEndCurve } from './wet-end-curve.ts';

/**
 * The flow at any speed (rpm) on a known system: the duty point, which without static head is flow in proportion to
 * speed. One standard deviation from that of k and of the head curve, by their first-order effect on the duty point.
 * `cannot-tell` where pump and system do not meet; bad numbers are `refused`.
 *
 * @example scaleFlow(curve, 1725, { staticFeet: 0, k: 0.0125, sigmaK: 0.001 })
 * // half the flow at 3450 rpm: { kind: 'estimate', from: 'system', gpm: 34.4, sigmaGpm: 1.1, … }
 * Source: affinity laws, HI Data Tool 1.B.6; first-order propagation of errors.
 */
export function scaleFlow(curve: WetEndCurve, rpm: number, system: SystemEstimate): FlowAnswer {
  if (!Number.isFinite(system.sigmaK) || system.sigmaK < 0)
    return refuseFlow('system.sigmaK', 'a finite sigma of k from 0 ft/gpm²');
  const duty = findDutyPoint(curve, rpm, system);
  if (duty.kind === 'refused') return refuseFlow(duty.field, duty.allowed);
  const ratio = speedRatio(curve, rpm);
  if (ratio === undefined) return cannotTell('standing');
  if (duty.kind !== 'duty') return cannotTell('no-duty-point');

  // On the duty point h(Q) = Hs + kQ²: a change of k or h moves Q by its effect over (2kQ − dh/dQ).
  const { gpm, feet } = duty;
  const stiffness = 2 * system.k * gpm - feetPerGpmAt(curve, ratio, gpm);
  const curveFeet = curve.headSigmaFeet * ratio ** 2;
  const sigmaGpm = Math.hypot(gpm ** 2 * system.sigmaK, curveFeet) / stiffness;
  if (!Number.isFinite(sigmaGpm)) return cannotTell('no-duty-point');
  const sigmaFeet = Math.hypot(feetPerGpmAt(curve, ratio, gpm) * sigmaGpm, curveFeet);
  return { kind: 'estimate', from: 'system', gpm, sigmaGpm, feet, sigmaFeet, k: system.k, sigmaK: system.sigmaK };
}
