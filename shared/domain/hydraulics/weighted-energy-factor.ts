import { findDutyPoint } from './duty-point.ts';
import { hydraulicHorsepower } from './hydraulic-power.ts';
import { REFERENCE_SYSTEM_CURVES } from './system-curve.ts';
import type { WetEndCurve } from './wet-end-curve.ts';

/** One load point of the test: its weight, flow and watts. */
export type LoadPoint = { readonly weight: number; readonly gpm: number; readonly watts: number };

/**
 * The weighted energy factor, thousands of gallons per kWh: Σ wᵢ·(Qᵢ/1000·60) ÷ Σ wᵢ·(Pᵢ/1000). undefined without
 * points, for bad numbers or without watts.
 *
 * @example weightedEnergyFactor([{ weight: 0.2, gpm: 64, watts: 700 }, { weight: 0.8, gpm: 31.1, watts: 120 }]) // 9.58
 * Source: US pool-pump test procedure, 10 CFR 431 Subpart Y, Appendix C (from memory).
 */
export function weightedEnergyFactor(points: readonly LoadPoint[]): number | undefined {
  const sound = points.every(({ weight, gpm, watts }) => weight > 0 && gpm >= 0 && watts > 0);
  const water = points.reduce((sum, { weight, gpm }) => sum + weight * (gpm / 1000) * 60, 0);
  const energy = points.reduce((sum, { weight, watts }) => sum + weight * (watts / 1000), 0);
  const factor = water / energy;
  return sound && Number.isFinite(factor) ? factor : undefined;
}

/** Low flow of the test, by hydraulic horsepower at top speed on curve C. From memory. */
const LOW_FLOW = { smallGpm: 24.7, largeGpm: 31.1, upToHorsepower: 0.75 };

export type ModelEnergyFactor = {
  readonly hydraulicHorsepower: number;
  readonly weightedEnergyFactor: number;
  readonly points: readonly LoadPoint[];
};

/**
 * The weighted energy factor of a variable-speed wet end as its curve gives it: 80 % of the top-speed flow on curve C
 * (weight 0.20) and 24.7 or 31.1 gpm (0.80), both on curve C. Top speed in rpm. A figure for comparing model sheets,
 * not a certified rating. undefined where the curve does not meet curve C, or its top-speed flow is under the low flow.
 *
 * @example modelEnergyFactor(curve, 3450)?.weightedEnergyFactor // 8.5
 * Source: Appendix C Table 1 (from memory).
 */
export function modelEnergyFactor(curve: WetEndCurve, topRpm: number): ModelEnergyFactor | undefined {
  const c = REFERENCE_SYSTEM_CURVES.c;
  const top = findDutyPoint(curve, topRpm, c);
  if (top.kind !== 'duty') return undefined;
  const horsepower = hydraulicHorsepower(top.gpm, top.feet);
  if (horsepower === undefined) return undefined;
  const lowGpm = horsepower <= LOW_FLOW.upToHorsepower ? LOW_FLOW.smallGpm : LOW_FLOW.largeGpm;
  if (lowGpm > top.gpm) return undefined;
  // Curve C has no static head: flow on it goes with speed.
  const points = [
    { weight: 0.2, share: 0.8 },
    { weight: 0.8, share: lowGpm / top.gpm },
  ].flatMap(({ weight, share }) => {
    const duty = findDutyPoint(curve, topRpm * share, c);
    return duty.kind === 'duty' ? [{ weight, gpm: duty.gpm, watts: duty.watts }] : [];
  });
  const factor = points.length === 2 ? weightedEnergyFactor(points) : undefined;
  return factor === undefined ? undefined : { hydraulicHorsepower: horsepower, weightedEnergyFactor: factor, points };
}
