import { describe, expect, it } from 'vitest';
import { isUsableFit, modelFitError } from '#shared/domain/energy/model-fit-error.ts';

describe('error of a fitted model', () => {
  it('divides by points less parameters (computed by hand)', () => {
    const error = modelFitError([100, 110, 90], [98, 112, 91], 1);

    expect(error?.cvRmse).toBeCloseTo(Math.sqrt(9 / 2) / 100, 9);
    expect(error?.nmbe).toBeCloseTo(-1 / 2 / 100, 9);
  });

  it('is judged by both figures: errors that cancel do not pass (ASHRAE G14-2014 as quoted on mepvault.com)', () => {
    const cancelling = modelFitError([100, 100, 100, 100], [140, 60, 140, 60], 1);

    expect(cancelling?.nmbe).toBeCloseTo(0, 9);
    expect(cancelling && isUsableFit(cancelling, 'monthly')).toBe(false);
    const close = modelFitError([100, 100, 100, 100], [104, 97, 103, 99], 1);
    expect(close && isUsableFit(close, 'monthly')).toBe(true);
  });

  it.each([
    ['lists of unlike length', [1, 2, 3], [1, 2], 1],
    ['no point to spare', [1, 2], [1, 2], 2],
    ['a mean of nothing', [0, 0, 0], [1, 1, 1], 1],
    ['NaN', [1, Number.NaN, 3], [1, 2, 3], 1],
    ['an endless model', [1, 2, 3], [1, Number.POSITIVE_INFINITY, 3], 1],
    ['half a parameter', [1, 2, 3], [1, 2, 3], 0.5],
    ['no points', [], [], 0],
  ])('is nothing for %s', (_, measured, modelled, parameters) => {
    expect(modelFitError(measured, modelled, parameters)).toBeUndefined();
  });
});
