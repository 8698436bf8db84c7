import { psiToFeetOfWater } from '#shared/units/pressure.ts';
import { checkNumbers, type NumberFault } from '../refusal/check-number.ts';
import { accepted, type Outcome, type Refusal, refused } from '../refusal/refusal.ts';
import { flowFromHead } from './flow-from-head.ts';
import { type GaugePair, headFromGauges } from './head-from-gauges.ts';
import { type MeterError, meterSigmaWatts } from './meter-error.ts';
import { scalePolynomial } from './polynomial.ts';
import { headAt, speedRatio, type WetEndCurve, wattsAt, wattsPerGpmAt } from './wet-end-curve.ts';

/** What was read at the pad beside the motor's own watts. `psi` is the filter gauge alone. */
export type Measurement =
  | { readonly kind: 'gauges'; readonly gauges: GaugePair }
  | { readonly kind: 'flow'; readonly gpm: number; readonly sigmaGpm?: number | undefined }
  | { readonly kind: 'psi'; readonly psi: number };

export type CalibrationReading = {
  readonly rpm: number;
  readonly watts: number;
  readonly measured: Measurement;
};

/** The wet end with its watts brought to what was measured, the gain that took, and the flow and head it stands on. */
export type Calibration = {
  readonly curve: WetEndCurve;
  readonly wattsGain: number;
  readonly gpm: number;
  readonly sigmaGpm: number;
  readonly feet: number;
};

export type CalibrationFault =
  | NumberFault
  | 'no-head'
  | 'off-curve'
  | 'flat-curve'
  | 'too-slow'
  | 'readings-contradict-curve';

/** Gauges at a pad are read to about this; common practice. */
const GAUGE_SIGMA_FEET = psiToFeetOfWater(1);
/** With the filter gauge alone the suction side is a guess, in feet; common practice. */
const SUCTION_GUESS = { feet: 6, sigmaFeet: 4 };
const FLOW_METER_SHARE = 0.05;
/** A wet end or meter off by more than this is another wet end, or a wrong reading. */
const WIDEST_GAIN = { least: 0.7, most: 1.4 };
/** Below this share of the reference speed the watts are too few to calibrate by. */
const SLOWEST_RATIO = 0.5;

type Flow = { readonly gpm: number; readonly sigmaGpm: number };

const fault = (reason: CalibrationFault, field: string, allowed: string): Refusal<CalibrationFault> => ({
  reason,
  field,
  allowed,
});

function readHead(measured: Exclude<Measurement, { kind: 'flow' }>): { feet: number; sigmaFeet: number } | undefined {
  if (measured.kind === 'psi') {
    const feet = headFromGauges({ dischargePsi: measured.psi, suctionInchesOfMercury: 0 });
    if (feet === undefined) return undefined;
    return {
      feet: feet + SUCTION_GUESS.feet,
      sigmaFeet: Math.hypot(GAUGE_SIGMA_FEET, SUCTION_GUESS.sigmaFeet),
    };
  }
  const feet = headFromGauges(measured.gauges);
  return feet === undefined ? undefined : { feet, sigmaFeet: GAUGE_SIGMA_FEET };
}

function readFlow(curve: WetEndCurve, rpm: number, measured: Measurement): Outcome<Flow, CalibrationFault> {
  if (measured.kind === 'flow') {
    const most = (curve.endGpm * rpm) / curve.referenceRpm;
    const { gpm, sigmaGpm = FLOW_METER_SHARE * gpm } = measured;
    const faults = checkNumbers([
      [gpm, { field: 'measured.gpm', unit: 'gpm', above: 0, most }],
      [sigmaGpm, { field: 'measured.sigmaGpm', unit: 'gpm', least: 0 }],
    ]);
    return faults.length > 0 ? refused(faults) : accepted({ gpm, sigmaGpm });
  }
  const head = readHead(measured);
  if (head === undefined)
    return refused([fault('no-head', 'measured', 'finite gauge readings that give a head from 0 ft')]);
  const flow = flowFromHead(curve, rpm, head.feet, head.sigmaFeet);
  if (flow.kind === 'flow') return accepted(flow);
  const shutOff = headAt(curve, rpm, 0) ?? 0;
  if (flow.because === 'flat-curve')
    return refused([
      fault('flat-curve', 'measured', 'a head where the curve falls: open valves until the flow is larger'),
    ]);
  return refused([fault('off-curve', 'measured', `a head on the curve at ${rpm} rpm, under ${shutOff.toFixed(1)} ft`)]);
}

/**
 * Calibrates a wet end against one reading (rpm, watts) taken together with gauges, a flow meter or the filter psi: the
 * flow they give, and the gain that brings the curve's watts to those read. The meter's error goes into the curve's new
 * sigma, together with that of the flow. Refuses by name: slower than half the reference speed, heads off the curve, a
 * flat curve, a gain outside 0.7 to 1.4.
 *
 * @example calibrateWetEnd(curve, { rpm: 3450, watts: 1550, measured: { kind: 'flow', gpm: 52 } }, METER_CHECKED)
 * // { ok: true, value: { wattsGain: 1.03, gpm: 52, … } }
 */
export function calibrateWetEnd(
  curve: WetEndCurve,
  reading: CalibrationReading,
  meter: MeterError,
): Outcome<Calibration, CalibrationFault> {
  const { rpm, watts, measured } = reading;
  const faults = checkNumbers([
    [rpm, { field: 'rpm', unit: 'rpm', above: 0, most: 1.2 * curve.referenceRpm }],
    [watts, { field: 'watts', unit: 'W', above: curve.standbyWatts }],
  ]);
  const ratio = speedRatio(curve, rpm);
  if (faults.length > 0 || ratio === undefined) return refused(faults);
  if (ratio < SLOWEST_RATIO) {
    const allowed = `at least ${Math.ceil(SLOWEST_RATIO * curve.referenceRpm)} rpm, where the watts tell flow`;
    return refused([fault('too-slow', 'rpm', allowed)]);
  }
  const flow = readFlow(curve, rpm, measured);
  if (!flow.ok) return flow;

  const { gpm, sigmaGpm } = flow.value;
  const moved = (wattsAt(curve, rpm, gpm) ?? 0) - curve.standbyWatts;
  const wattsGain = (watts - curve.standbyWatts) / moved;
  if (!(wattsGain >= WIDEST_GAIN.least && wattsGain <= WIDEST_GAIN.most)) {
    const [least, most] = [WIDEST_GAIN.least * moved, WIDEST_GAIN.most * moved].map((w) => w + curve.standbyWatts);
    const allowed = `${least?.toFixed(0)} to ${most?.toFixed(0)} W at this speed and flow: check gauges, speed and wet end`;
    return refused([fault('readings-contradict-curve', 'watts', allowed)]);
  }
  const fromFlow = (wattsPerGpmAt(curve, ratio, gpm) * sigmaGpm) / moved;
  const fromMeter = meterSigmaWatts(meter, watts) / watts;
  return accepted({
    curve: {
      ...curve,
      power: scalePolynomial(curve.power, wattsGain),
      lossWatts: curve.lossWatts * wattsGain,
      powerSigmaShare: Math.hypot(fromFlow, fromMeter),
    },
    wattsGain,
    gpm,
    sigmaGpm,
    feet: headAt(curve, rpm, gpm) ?? 0,
  });
}
