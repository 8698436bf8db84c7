import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import type { LearnedBands } from './learned-bands.ts';
import type { LoadBasis } from './load-facts.ts';

/** What a full wet end should draw at a speed, W, and how that is known. */
export type PrimedWatts = { readonly watts: number; readonly basis: LoadBasis };

/** Before any dry event, dry is this share of primed (common practice; no published figure). */
export const DRY_SHARE = 0.35;
/** Below this share of primed watts the wet end moves air; above it, water that goes nowhere (common practice). */
export const AIR_SHARE = 0.41;
/** Halfway between dry and primed, as a share of primed. */
export const HALFWAY_SHARE = (1 + DRY_SHARE) / 2;
/**
 * Where primed watts are known only to a quarter (a model, another speed): halfway between the highest dry and the
 * lowest primed, 1.25 · 0.35 and 0.75.
 */
export const ROUGH_SHARE = (1.25 * DRY_SHARE + 0.75) / 2;

/**
 * Power rises with the cube of speed in the water and more slowly in the drive; together about 2.7 (common practice).
 * Used only between two speeds of one pump that are within a factor of three.
 */
const SPEED_EXPONENT = 2.7;
const FARTHEST_FACTOR = 3;
/** Nearer than this, another speed of the same pump tells more than its model. */
const NEAR_FACTOR = 1.5;

const UNKNOWN: PrimedWatts = { watts: 0, basis: 'none' };

/**
 * Primed watts at a speed (rpm): its own learnt band, what past primes drew at that speed, another speed's band
 * carried over, or the wet end's model; basis `none` and 0 W where nothing is known.
 *
 * @example primedWattsAt(2850, bands, undefined, context).basis // 'model'
 */
export function primedWattsAt(
  rpm: number,
  bands: LearnedBands,
  prime: { readonly rpm: number; readonly watts: number } | undefined,
  context: PumpContext,
): PrimedWatts {
  const own = bands.find(rpm);
  if (own?.valid === true) return { watts: own.median, basis: 'band' };
  if (prime !== undefined && Math.abs(prime.rpm - rpm) <= prime.rpm * 0.02)
    return { watts: prime.watts, basis: 'prime' };
  return (
    scaledWatts(rpm, bands, context, NEAR_FACTOR) ??
    modelWatts(rpm, context) ??
    scaledWatts(rpm, bands, context, FARTHEST_FACTOR) ??
    UNKNOWN
  );
}

function scaledWatts(
  rpm: number,
  bands: LearnedBands,
  context: PumpContext,
  farthest: number,
): PrimedWatts | undefined {
  const standby = context.wetEnd?.standbyWatts ?? 0;
  let nearest: { readonly rpm: number; readonly median: number } | undefined;
  for (const band of bands.list()) {
    if (!band.valid || band.median <= standby) continue;
    if (nearest === undefined || distance(band.rpm, rpm) < distance(nearest.rpm, rpm)) nearest = band;
  }
  if (nearest === undefined || distance(nearest.rpm, rpm) > Math.log(farthest)) return undefined;
  return { watts: standby + (nearest.median - standby) * (rpm / nearest.rpm) ** SPEED_EXPONENT, basis: 'scaled' };
}

const distance = (left: number, right: number): number => Math.abs(Math.log(left / right));

/**
 * The model's watts at a speed by the affinity laws (flow as speed, power as its cube, standby apart), at the duty
 * point of the system curve where that is known, else at six tenths of the model's largest flow.
 *
 * @example modelWatts(3450, context)?.basis // 'model'; undefined without a wet-end model
 */
export function modelWatts(rpm: number, context: PumpContext): PrimedWatts | undefined {
  const { wetEnd, systemK } = context;
  if (wetEnd === undefined || wetEnd.points.length === 0 || !(wetEnd.referenceRpm > 0)) return undefined;
  const points = [...wetEnd.points].sort((left, right) => left.gpm - right.gpm);
  const gpm = systemK === undefined ? 0.6 * (points.at(-1)?.gpm ?? 0) : dutyGpm(points, systemK);
  const reference = interpolate(points, gpm);
  const { standbyWatts } = wetEnd;
  const watts = standbyWatts + Math.max(0, reference - standbyWatts) * (rpm / wetEnd.referenceRpm) ** 3;
  return watts > 0 ? { watts, basis: 'model' } : undefined;
}

type Point = { readonly gpm: number; readonly feet: number; readonly watts: number };

/** Where the pump's head meets H = k·Q²; with both ∝ speed² this is the same point of the curve at every speed. */
function dutyGpm(points: readonly Point[], k: number): number {
  for (let index = 0; index + 1 < points.length; index += 1) {
    const left = points[index];
    const right = points[index + 1];
    if (left === undefined || right === undefined) break;
    const above = left.feet - k * left.gpm ** 2;
    const below = right.feet - k * right.gpm ** 2;
    if (above >= 0 && below < 0) return left.gpm + ((right.gpm - left.gpm) * above) / (above - below);
  }
  return points.at(-1)?.gpm ?? 0;
}

function interpolate(points: readonly Point[], gpm: number): number {
  let before = points[0];
  for (const point of points) {
    if (point.gpm >= gpm) {
      if (before === undefined || point.gpm === before.gpm) return point.watts;
      return before.watts + ((point.watts - before.watts) * (gpm - before.gpm)) / (point.gpm - before.gpm);
    }
    before = point;
  }
  return before?.watts ?? 0;
}
