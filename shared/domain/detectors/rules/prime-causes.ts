import type { Facts } from '../facts.ts';
import { modelWatts } from '../load/primed-watts.ts';

/** One cause of a pump that does not prime, with what speaks for it. */
export type PrimeCause = { readonly cause: string; readonly weight: number; readonly because: string };

/** Below this share of primed watts the wet end moves air; above it, water that goes nowhere (common practice). */
export const AIR_SHARE = 0.41;
/** Ragged watts, as standard deviation over mean. */
const RAGGED_SHARE = 0.11;
/** A wet end that stood this long may have drained. */
const LONG_STAND_SECONDS = 6 * 3600;
/** Near the model's own watts at no flow. */
const SHUT_OFF_SHARE = 0.1;

/**
 * The causes of a failed prime, the likeliest first, by what the watts look like. The order among equals is how often
 * each is found (common practice): the readings cannot tell an open lid from a drip at a union.
 *
 * @example rankPrimeCauses(facts)[0]?.cause // 'air-leak'
 */
export function rankPrimeCauses(facts: Facts): readonly PrimeCause[] {
  const { load } = facts;
  const primedWatts = load.wattsAt(load.judgedRpm);
  const share = primedWatts > 0 ? load.judgedWatts / primedWatts : 0;
  const stoodLong = load.stoodSeconds >= LONG_STAND_SECONDS;
  const air = share < AIR_SHARE;
  const ragged = Math.max(load.raggedness, load.tryRaggedness) > RAGGED_SHARE;
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
      weight: !air && !ragged && isNearShutOff(facts) ? 4 : 0,
      because: 'steady watts of no flow',
    },
    { cause: 'blocked', weight: air ? 0.5 : 3, because: 'some load, far too little' },
  ];
  return causes.filter(({ weight }) => weight > 0).sort((left, right) => right.weight - left.weight);
}

/** Whether the watts are those of a full wet end that moves no water; false without a model. */
export function isNearShutOff({ load, context }: Facts): boolean {
  const { wetEnd } = context;
  if (wetEnd === undefined) return false;
  const shut = wetEnd.points.filter(({ gpm }) => gpm === 0);
  const atNoFlow = modelWatts(load.judgedRpm, { ...context, wetEnd: { ...wetEnd, points: shut } })?.watts;
  return atNoFlow !== undefined && Math.abs(load.judgedWatts / atNoFlow - 1) <= SHUT_OFF_SHARE;
}
