import { cannotTell, type FlowAnswer, HIGH_SPEED_RATIO, refuseFlow, WIDEST_SIGMA_SHARE } from './flow-estimate.ts';
import { type FlowsAtWatts, findFlowsAtWatts } from './flows-at-watts.ts';
import { type MeterError, meterSigmaWatts } from './meter-error.ts';
import { systemK } from './system-curve.ts';
import { feetPerGpmAt, headAt, lossShape, speedRatio, type WetEndCurve, wattsPerGpmAt } from './wet-end-curve.ts';

export type WattsReading = { readonly rpm: number; readonly watts: number };

/** Flows whose watts lie within this many sigmas of the reading are all taken for possible. */
const POSSIBLE_SIGMAS = 2;
/** Under this share of the flow range k = H ÷ Q² is all noise. */
const LEAST_FLOW_SHARE = 0.02;

/** One sigma of measured against modelled watts: the meter, the curve as built, and the loss beyond the cube law. */
const wattsSigma = (curve: WetEndCurve, ratio: number, watts: number, meter: MeterError): number =>
  Math.hypot(
    meterSigmaWatts(meter, watts),
    curve.powerSigmaShare * Math.max(0, watts - curve.standbyWatts),
    curve.lossSigmaWatts * lossShape(ratio),
  );

/** One sigma of flow: half of what two sigmas of watts reach to either side, and not under the local slope's. */
function flowSigma(curve: WetEndCurve, ratio: number, flows: FlowsAtWatts, sigmaWatts: number): number {
  const { leastGpm, middleGpm, mostGpm, pieces } = flows;
  const reach = Math.max(mostGpm - middleGpm, middleGpm - leastGpm) / POSSIBLE_SIGMAS;
  return pieces > 1 ? reach : Math.max(reach, sigmaWatts / Math.abs(wattsPerGpmAt(curve, ratio, middleGpm)));
}

const estimateAt = (
  curve: WetEndCurve,
  rpm: number,
  ratio: number,
  gpm: number,
  sigmaGpm: number,
  staticFeet: number,
): FlowAnswer => {
  const feet = headAt(curve, rpm, gpm) ?? 0;
  const curveFeet = curve.headSigmaFeet * ratio ** 2;
  const slope = feetPerGpmAt(curve, ratio, gpm);
  const enough = gpm > LEAST_FLOW_SHARE * curve.largestGpm * ratio;
  const k = enough ? systemK(gpm, feet, staticFeet) : undefined;
  // dk/dQ of (H(Q) − Hs) ÷ Q²: head falls and Q² grows, both the same way.
  const sigmaK =
    k === undefined ? undefined : Math.hypot((slope / gpm ** 2 - (2 * k) / gpm) * sigmaGpm, curveFeet / gpm ** 2);
  return {
    kind: 'estimate',
    from: 'watts',
    gpm,
    sigmaGpm,
    feet,
    sigmaFeet: Math.hypot(slope * sigmaGpm, curveFeet),
    k,
    sigmaK,
  };
};

/**
 * Estimates flow (gpm), head (ft) and system k (ft/gpm²) from one speed (rpm, up to 1.2 of the reference) and watts (0
 * to 6000), each with one standard deviation from the meter, the curve and the local slope. Says `cannot-tell` where
 * the curve is flat, turns over, or the speed is too low for the watts to speak. Bad numbers are `refused` by name.
 *
 * @example estimateFlow(curve, { rpm: 3450, watts: 1500 }, METER_CHECKED)
 * // { kind: 'estimate', from: 'watts', gpm: 51.9, sigmaGpm: 6.5, feet: 69.3, … }
 * Source: first-order propagation of errors; power against flow, HI Data Tool 02_pump-curves.
 */
export function estimateFlow(curve: WetEndCurve, reading: WattsReading, meter: MeterError, staticFeet = 0): FlowAnswer {
  const { rpm, watts } = reading;
  if (!Number.isFinite(rpm) || rpm < 0 || rpm > 1.2 * curve.referenceRpm)
    return refuseFlow('rpm', `a finite speed from 0 to ${Math.round(1.2 * curve.referenceRpm)} rpm`);
  if (!Number.isFinite(watts) || watts < 0) return refuseFlow('watts', 'finite watts from 0');
  if (!Number.isFinite(staticFeet)) return refuseFlow('staticFeet', 'a finite static head in feet');
  const ratio = speedRatio(curve, rpm);
  if (ratio === undefined) return cannotTell('standing');

  const sigma = wattsSigma(curve, ratio, watts, meter);
  const flows = findFlowsAtWatts(curve, rpm, watts, POSSIBLE_SIGMAS * sigma);
  if (flows === 'under') return cannotTell('under-curve');
  if (flows === 'over') return cannotTell('over-curve');
  const sigmaGpm = flowSigma(curve, ratio, flows, sigma);
  // Two flows for one reading are shown as one only where they lie close together.
  const widest = (WIDEST_SIGMA_SHARE / flows.pieces) * curve.largestGpm * ratio;
  if (!(sigmaGpm <= widest)) {
    if (ratio < HIGH_SPEED_RATIO) return cannotTell('low-speed');
    return cannotTell(flows.pieces > 1 ? 'turning-over' : 'flat-curve');
  }
  return estimateAt(curve, rpm, ratio, flows.middleGpm, sigmaGpm, staticFeet);
}
