import { findRoot } from './find-root.ts';
import { turningPoints } from './polynomial.ts';
import { type WetEndCurve, wattsAt } from './wet-end-curve.ts';

/**
 * The flows that a band of watts allows at one speed: the least and the most, the flow at the band's middle, and over
 * how many monotone pieces of the power curve they lie (more than one: it turns over inside the band).
 */
export type FlowsAtWatts = {
  readonly leastGpm: number;
  readonly middleGpm: number;
  readonly mostGpm: number;
  readonly pieces: number;
};

type Piece = {
  readonly lowWatts: number;
  readonly highWatts: number;
  readonly gpmAt: (watts: number) => number;
};

/** The power curve from shut-off to the last measured flow, cut where it turns: each piece has one flow for each watt. */
function monotonePieces(curve: WetEndCurve, rpm: number): Piece[] {
  const ratio = rpm / curve.referenceRpm;
  const end = curve.largestGpm * ratio;
  const turns = turningPoints(curve.power).map((gpm) => gpm * ratio);
  const bounds = [0, ...turns.filter((gpm) => gpm > 0 && gpm < end), end];
  const at = (gpm: number): number => wattsAt(curve, rpm, gpm) ?? Number.NaN;
  return bounds.slice(1).map((right, index) => {
    const left = bounds[index] ?? 0;
    const [atLeft, atRight] = [at(left), at(right)];
    const gpmAt = (watts: number): number => {
      if (watts <= Math.min(atLeft, atRight)) return atLeft <= atRight ? left : right;
      if (watts >= Math.max(atLeft, atRight)) return atLeft <= atRight ? right : left;
      return findRoot((gpm) => at(gpm) - watts, left, right) ?? left;
    };
    return { lowWatts: Math.min(atLeft, atRight), highWatts: Math.max(atLeft, atRight), gpmAt };
  });
}

/**
 * Finds every flow (gpm) at a speed (rpm above 0) whose watts lie within `spread` of the given ones. Past either end of
 * the curve it answers `under` or `over`.
 *
 * @example findFlowsAtWatts(curve, 3450, 1500, 100) // { leastGpm: 41, middleGpm: 51.9, mostGpm: 63.6, pieces: 1 }
 */
export function findFlowsAtWatts(
  curve: WetEndCurve,
  rpm: number,
  watts: number,
  spread: number,
): FlowsAtWatts | 'under' | 'over' {
  const pieces = monotonePieces(curve, rpm);
  const possible = pieces.filter((piece) => piece.highWatts >= watts - spread && piece.lowWatts <= watts + spread);
  const [only] = possible;
  if (only === undefined) return pieces.every((piece) => piece.lowWatts > watts) ? 'under' : 'over';
  const edges = possible.flatMap((piece) => [piece.gpmAt(watts - spread), piece.gpmAt(watts + spread)]);
  const [leastGpm, mostGpm] = [Math.min(...edges), Math.max(...edges)];
  const middleGpm = possible.length === 1 ? only.gpmAt(watts) : (leastGpm + mostGpm) / 2;
  return { leastGpm, middleGpm, mostGpm, pieces: possible.length };
}
