import { findDutyPoint } from '../hydraulics/duty-point.ts';
import type { SystemCurve } from '../hydraulics/system-curve.ts';
import { lossShape, speedRatio, type WetEndCurve, wattsAt } from '../hydraulics/wet-end-curve.ts';

/** What a speed moves and draws on one pad: rpm, gpm, watts at the line. */
export type SpeedOption = { readonly rpm: number; readonly gpm: number; readonly watts: number };

/** Keypads step by 10 or 50 rpm; 50 is fine enough for a program. Common practice. */
export const SPEED_STEP_RPM = 50;

/** What drive and motor may lose beyond the model, one sigma: counted, so that slow speeds look no cheaper than they are. */
const unknownLossWatts = (curve: WetEndCurve, rpm: number): number =>
  curve.lossSigmaWatts * Math.max(0, lossShape(speedRatio(curve, rpm) ?? 0));

/**
 * What a speed (rpm, above 0) moves and draws on a pad's system curve, the drive's unknown loss counted at one sigma.
 * Where the system asks for less than the wet end's curve knows of, it is taken at the curve's end: at least that much
 * water. A pump that cannot lift the static head moves none. undefined for bad numbers.
 *
 * @example speedOptionAt(curve, { staticFeet: 0, k: 0.0125 }, 1700) // { rpm: 1700, gpm: 33.9, watts: 246 }
 */
export function speedOptionAt(curve: WetEndCurve, system: SystemCurve, rpm: number): SpeedOption | undefined {
  const duty = findDutyPoint(curve, rpm, system);
  if (duty.kind === 'refused') return undefined;
  const loss = unknownLossWatts(curve, rpm);
  if (duty.kind === 'duty') return { rpm, gpm: duty.gpm, watts: duty.watts + loss };
  if (duty.kind === 'no-flow') return { rpm, gpm: 0, watts: duty.watts + loss };
  return { rpm, gpm: duty.endGpm, watts: (wattsAt(curve, rpm, duty.endGpm) ?? 0) + loss };
}

/**
 * The speeds that a program may choose from, slowest first: every step between the motor's least and highest speed and
 * both of these, with flow and watts on the pad's system curve. Speeds that move no water are left out. Empty for
 * speeds or a step that are not above 0.
 *
 * @example listSpeedOptions(curve, { staticFeet: 0, k: 0.0125 }, 600, 3450)[0] // { rpm: 600, gpm: 11.97, watts: 36 }
 */
export function listSpeedOptions(
  curve: WetEndCurve,
  system: SystemCurve,
  minRpm: number,
  maxRpm: number,
  stepRpm = SPEED_STEP_RPM,
): SpeedOption[] {
  if (!(minRpm > 0 && minRpm <= maxRpm && stepRpm >= 1) || !Number.isFinite(maxRpm)) return [];
  const speeds = new Set([minRpm, maxRpm]);
  for (let rpm = Math.ceil(minRpm / stepRpm) * stepRpm; rpm < maxRpm; rpm += stepRpm) speeds.add(rpm);
  return [...speeds]
    .sort((left, right) => left - right)
    .flatMap((rpm) => speedOptionAt(curve, system, rpm) ?? [])
    .filter(({ gpm }) => gpm > 0);
}
