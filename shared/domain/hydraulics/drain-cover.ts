import type { FlowAnswer } from './flow-estimate.ts';

/**
 * A suction outlet's covers against the flow at top speed. `cannot-tell` is not a pass: the flow's band reaches over
 * the rating, or there is no flow to hold against it. Millrace is no entrapment device; this finds a cover to look at.
 */
export type DrainCoverCheck =
  | { readonly kind: 'within' | 'over'; readonly ratingGpm: number; readonly gpm: number; readonly sigmaGpm: number }
  | { readonly kind: 'cannot-tell'; readonly because: 'band-reaches-rating' | 'no-flow-estimate' | 'no-rating' };

const BAND_SIGMAS = 2;

/**
 * Holds the flow at top speed against the ratings (gpm) of a suction outlet's covers. Each cover must carry the whole
 * flow, since the others may be blocked, so the smallest rating decides. Ratings that are not above 0 count as none.
 *
 * @example checkDrainCovers([110], flowAtTopSpeed) // { kind: 'within', ratingGpm: 110, gpm: 82, sigmaGpm: 6 }
 * Source: rating of the cover for the whole flow of the system with one outlet blocked, from memory (ANSI/APSP/ICC-16).
 */
export function checkDrainCovers(ratingsGpm: readonly number[], atTopSpeed: FlowAnswer): DrainCoverCheck {
  if (ratingsGpm.length === 0 || !ratingsGpm.every((rating) => Number.isFinite(rating) && rating > 0))
    return { kind: 'cannot-tell', because: 'no-rating' };
  if (atTopSpeed.kind !== 'estimate') return { kind: 'cannot-tell', because: 'no-flow-estimate' };
  const ratingGpm = Math.min(...ratingsGpm);
  const { gpm, sigmaGpm } = atTopSpeed;
  if (gpm + BAND_SIGMAS * sigmaGpm <= ratingGpm) return { kind: 'within', ratingGpm, gpm, sigmaGpm };
  if (gpm - BAND_SIGMAS * sigmaGpm > ratingGpm) return { kind: 'over', ratingGpm, gpm, sigmaGpm };
  return { kind: 'cannot-tell', because: 'band-reaches-rating' };
}
