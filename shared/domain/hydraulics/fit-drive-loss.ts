import { accepted, type Outcome, refused } from '../refusal/refusal.ts';
import { lossShape, type WetEndCurve, wattsAt } from './wet-end-curve.ts';
import type { LowSpeedPoint } from './wet-end-sheet.ts';

export type DriveLoss = Pick<WetEndCurve, 'lossWatts' | 'lossSigmaWatts'>;

/**
 * One sigma of the unknown loss where no low-speed point was measured, as a share of the mean watts. Near 1000 rpm pumps
 * draw about twice what the cube law gives (from memory).
 */
const UNKNOWN_LOSS_SHARE = 0.08;
/** The least sigma of a fitted loss: the points were read with a meter too. */
const FITTED_LOSS_SHARE = 0.01;
/** A loss may come out this far below none before the points contradict the curve. */
const NEGATIVE_LOSS_SHARE = 0.02;

/**
 * Fits the watts that drive and motor lose beyond the cube law, by least squares over points at lower speeds (rpm,
 * gpm, watts). Without points: no loss, and the sigma of not knowing it. Refuses points beyond the curve's end and
 * points that need clearly less than the cube law gives.
 *
 * @example fitDriveLoss(curve, 1500, []) // { ok: true, value: { lossWatts: 0, lossSigmaWatts: 120 } }
 * Source: the loss shape r − r³ is ours: it is nothing at standstill and at the reference speed (common practice).
 */
export function fitDriveLoss(
  curve: WetEndCurve,
  meanWatts: number,
  points: readonly LowSpeedPoint[],
): Outcome<DriveLoss, 'flow-beyond-curve' | 'low-speed-watts-under-cube'> {
  if (points.length === 0) return accepted({ lossWatts: 0, lossSigmaWatts: UNKNOWN_LOSS_SHARE * meanWatts });
  const beyond = points.flatMap((point, index) => {
    const most = (curve.endGpm * point.rpm) / curve.referenceRpm;
    if (point.gpm <= most) return [];
    const allowed = `at most ${Math.floor(most)} gpm, where the curve ends at ${point.rpm} rpm`;
    return [{ reason: 'flow-beyond-curve', field: `lowSpeedPoints[${index}].gpm`, allowed } as const];
  });
  if (beyond.length > 0) return refused(beyond);

  const rows = points.map((point) => ({
    shape: lossShape(point.rpm / curve.referenceRpm),
    extra: point.watts - (wattsAt(curve, point.rpm, point.gpm) ?? 0),
  }));
  const weight = rows.reduce((sum, row) => sum + row.shape ** 2, 0);
  const fitted = rows.reduce((sum, row) => sum + row.shape * row.extra, 0) / weight;
  if (!Number.isFinite(fitted) || fitted < -NEGATIVE_LOSS_SHARE * meanWatts) {
    const allowed = 'watts at least those of the cube law from the points at the reference speed';
    return refused([{ reason: 'low-speed-watts-under-cube', field: 'lowSpeedPoints', allowed }]);
  }
  const spare = Math.max(1, rows.length - 1);
  const left = rows.reduce((sum, row) => sum + (row.extra - fitted * row.shape) ** 2, 0);
  const lossSigmaWatts = Math.hypot(Math.sqrt(left / spare / weight), FITTED_LOSS_SHARE * meanWatts);
  return accepted({ lossWatts: Math.max(0, fitted), lossSigmaWatts });
}
