import type { Facts } from '../facts.ts';
import { AIR_SHARE, modelWatts } from '../load/primed-watts.ts';

/** One cause of a pump that does not prime, with what speaks for it. */
export type PrimeCause = { readonly cause: string; readonly weight: number; readonly because: string };

/** Standard deviation of the watts over their mean from which bubbles go through. */
export const RAGGED_SHARE = 0.11;
/** A wet end that stood this long may have drained. */
const LONG_STAND_SECONDS = 6 * 3600;
/** Near the model's own share of watts at no flow. */
const NO_FLOW_SHARE = 0.07;
/** Without a model: a wet end that is full draws this of its usual watts even where nothing flows (common practice). */
const FULL_SHARE = 0.57;

/**
 * The causes of a failed prime, the likeliest first, by what the watts look like at the fastest speed of the start. The
 * order among equals is how often each is found (common practice): the readings cannot tell an open lid from a drip at
 * a union.
 *
 * @example rankPrimeCauses(facts)[0]?.cause // 'air-leak'
 */
export function rankPrimeCauses(facts: Facts): readonly PrimeCause[] {
  const { load } = facts;
  const primedWatts = load.wattsAt(load.triedRpm);
  const share = primedWatts > 0 ? load.triedWatts / primedWatts : 0;
  const stoodLong = load.stoodSeconds >= LONG_STAND_SECONDS;
  const air = share < AIR_SHARE;
  const raggedness = Math.max(load.raggedness, load.tryRaggedness);
  const ragged = raggedness > RAGGED_SHARE;
  // While nobody knows yet whether the watts hold still, little speaks for any cause.
  const certainty = raggedness > 0 ? 1 : 0.5;
  const causes: readonly PrimeCause[] = [
    {
      cause: 'water-low',
      weight: load.caught ? 5 : ragged ? 2 : 1,
      because: load.caught ? 'caught load and lost it again' : 'watts of air',
    },
    { cause: 'air-leak', weight: ragged ? 3.5 : air ? 3 : 0, because: ragged ? 'ragged watts' : 'watts of air' },
    {
      cause: 'drained-back',
      weight: air && stoodLong ? 1.5 : 0.5,
      because: stoodLong ? 'stood for long before the start' : 'a try that follows another drains between them',
    },
    {
      cause: 'valve-shut',
      weight: air || ragged ? 0 : valveShutWeight(facts, share),
      because: 'steady watts of no flow',
    },
    { cause: 'blocked', weight: air ? 0.5 : 3, because: 'some load, far too little' },
  ];
  return causes
    .filter(({ weight }) => weight > 0)
    .map((one) => ({ ...one, weight: one.weight * certainty }))
    .sort((left, right) => right.weight - left.weight);
}

function valveShutWeight(facts: Facts, share: number): number {
  const near = isNearNoFlow(facts);
  if (near !== undefined) return near ? 4 : 0;
  return share >= FULL_SHARE ? 3.2 : 2;
}

/**
 * Whether the watts are those of a full wet end that moves no water, as a share of the usual ones, which leaves the
 * meter's own error out; undefined where no model tells its share.
 */
export function isNearNoFlow({ load, context }: Facts): boolean | undefined {
  const { wetEnd } = context;
  const usual = load.wattsAt(load.triedRpm);
  const duty = modelWatts(load.triedRpm, context)?.watts;
  const still = wetEnd?.points.filter(({ gpm }) => gpm === 0) ?? [];
  if (wetEnd === undefined || still.length === 0 || duty === undefined || usual <= 0) return undefined;
  const noFlow = modelWatts(load.triedRpm, { ...context, wetEnd: { ...wetEnd, points: still } })?.watts;
  if (noFlow === undefined) return undefined;
  return Math.abs(load.triedWatts / usual - noFlow / duty) <= NO_FLOW_SHARE;
}
