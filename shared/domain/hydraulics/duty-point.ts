import { findRoot } from './find-root.ts';
import { isSystemCurve, type SystemCurve, systemHead } from './system-curve.ts';
import { headAt, speedRatio, type WetEndCurve, wattsAt } from './wet-end-curve.ts';

/**
 * Where pump and system meet. `beyondPoints`: the flow lies past the last measured point of the wet end. `no-flow`: the
 * pump stands, or cannot lift the static head. `beyond-curve`: the system asks for less than the curve knows of.
 */
export type DutyPoint =
  | {
      readonly kind: 'duty';
      readonly gpm: number;
      readonly feet: number;
      readonly watts: number;
      readonly beyondPoints: boolean;
    }
  | { readonly kind: 'no-flow'; readonly because: 'standing' | 'static-head-above-shut-off'; readonly watts: number }
  | { readonly kind: 'beyond-curve'; readonly endGpm: number }
  | { readonly kind: 'refused'; readonly field: 'rpm' | 'system'; readonly allowed: string };

const refuse = (field: 'rpm' | 'system', allowed: string): DutyPoint => ({ kind: 'refused', field, allowed });

/**
 * The duty point at a speed (rpm from 0) on a system curve, by a bracketed solve between shut-off and the curve's end,
 * so that it cannot diverge. Bad numbers come back as `refused`, with what is allowed.
 *
 * @example findDutyPoint(curve, 3450, { staticFeet: 265, k: 7.75e-4 }) // { kind: 'duty', gpm: 200, feet: 296, … }
 * Source: intersection of pump and system curve, HI Data Tool 03_combined.
 */
export function findDutyPoint(curve: WetEndCurve, rpm: number, system: SystemCurve): DutyPoint {
  if (!Number.isFinite(rpm) || rpm < 0) return refuse('rpm', 'a finite speed from 0 rpm');
  if (!isSystemCurve(system)) return refuse('system', 'static head -100 to 300 ft and k above 0 ft/gpm²');
  const ratio = speedRatio(curve, rpm);
  const shutOffWatts = wattsAt(curve, rpm, 0) ?? curve.standbyWatts;
  if (ratio === undefined) return { kind: 'no-flow', because: 'standing', watts: shutOffWatts };

  const endGpm = curve.endGpm * ratio;
  const excess = (gpm: number): number => (headAt(curve, rpm, gpm) ?? 0) - (systemHead(system, gpm) ?? 0);
  if (excess(0) <= 0) return { kind: 'no-flow', because: 'static-head-above-shut-off', watts: shutOffWatts };
  const gpm = findRoot(excess, 0, endGpm);
  if (gpm === undefined) return { kind: 'beyond-curve', endGpm };
  const beyondPoints = gpm > curve.largestGpm * ratio;
  return {
    kind: 'duty',
    gpm,
    feet: systemHead(system, gpm) ?? 0,
    watts: wattsAt(curve, rpm, gpm) ?? shutOffWatts,
    beyondPoints,
  };
}
