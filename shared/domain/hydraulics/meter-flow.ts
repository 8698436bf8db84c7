import { estimateFlow, type WattsReading } from './estimate-flow.ts';
import { type FlowAnswer, HIGH_SPEED_RATIO } from './flow-estimate.ts';
import type { MeterError } from './meter-error.ts';
import { scaleFlow } from './scale-flow.ts';
import type { SystemEstimate } from './system-estimate.ts';
import { speedRatio, type WetEndCurve } from './wet-end-curve.ts';

/** What the virtual flow meter knows of a pump: its wet end, its meter, and the system of the day where it is known. */
export type FlowMeter = {
  readonly curve: WetEndCurve;
  readonly meter: MeterError;
  readonly staticFeet: number;
  readonly daySystem?: SystemEstimate | undefined;
};

/**
 * The virtual flow meter: flow (gpm), head (ft) and k with one standard deviation from a speed (rpm) and watts. At high
 * speed the watts tell; below 0.7 of the reference speed the k of the day's fast runs is scaled to this speed, and the
 * watts are asked only when there is none. Where neither can say, it answers `cannot-tell` and why.
 *
 * @example meterFlow({ curve, meter: METER_CHECKED, staticFeet: 0 }, { rpm: 900, watts: 60 })
 * // { kind: 'cannot-tell', because: 'low-speed' }
 */
export function meterFlow(meter: FlowMeter, reading: WattsReading): FlowAnswer {
  const fromWatts = estimateFlow(meter.curve, reading, meter.meter, meter.staticFeet);
  const ratio = speedRatio(meter.curve, reading.rpm);
  if (fromWatts.kind === 'refused' || ratio === undefined || meter.daySystem === undefined) return fromWatts;
  // A load under or over the curve is news, not a matter of precision: the day's system would hide it.
  const speaks = fromWatts.kind === 'cannot-tell' && ['under-curve', 'over-curve'].includes(fromWatts.because);
  if (speaks || (ratio >= HIGH_SPEED_RATIO && fromWatts.kind === 'estimate')) return fromWatts;
  const scaled = scaleFlow(meter.curve, reading.rpm, meter.daySystem);
  return scaled.kind === 'estimate' ? scaled : fromWatts;
}
