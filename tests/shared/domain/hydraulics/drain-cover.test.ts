import { describe, expect, it } from 'vitest';
import { checkDrainCovers } from '#shared/domain/hydraulics/drain-cover.ts';
import type { FlowAnswer } from '#shared/domain/hydraulics/flow-estimate.ts';

const flow = (gpm: number, sigmaGpm: number): FlowAnswer => ({
  kind: 'estimate',
  from: 'watts',
  gpm,
  sigmaGpm,
  feet: 40,
  sigmaFeet: 2,
  k: 0.01,
  sigmaK: 0.001,
});

describe('drain covers against top speed', () => {
  it('lets the smallest rating decide, since the other cover may be blocked', () => {
    expect(checkDrainCovers([110, 80], flow(85, 2))).toMatchObject({ kind: 'over', ratingGpm: 80 });
    expect(checkDrainCovers([110, 110], flow(85, 2))).toMatchObject({ kind: 'within', ratingGpm: 110 });
  });

  it('passes nothing whose band reaches over the rating', () => {
    expect(checkDrainCovers([88], flow(85, 2))).toEqual({ kind: 'cannot-tell', because: 'band-reaches-rating' });
  });

  it('cannot tell without a rating or a flow', () => {
    expect(checkDrainCovers([], flow(85, 2))).toEqual({ kind: 'cannot-tell', because: 'no-rating' });
    expect(checkDrainCovers([Number.NaN], flow(85, 2))).toEqual({ kind: 'cannot-tell', because: 'no-rating' });
    expect(checkDrainCovers([110], { kind: 'cannot-tell', because: 'flat-curve' })).toEqual({
      kind: 'cannot-tell',
      because: 'no-flow-estimate',
    });
  });
});
