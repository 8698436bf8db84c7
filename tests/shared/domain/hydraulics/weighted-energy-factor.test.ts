import { describe, expect, it } from 'vitest';
import { leastEnergyFactor } from '#shared/domain/hydraulics/least-energy-factor.ts';
import { modelEnergyFactor, weightedEnergyFactor } from '#shared/domain/hydraulics/weighted-energy-factor.ts';
import { fitOrFail, POOL_SHEET } from './sample-wet-ends.ts';

const pool = fitOrFail(POOL_SHEET);

describe('weighted energy factor', () => {
  it('is 9.580 for a variable-speed pump of 64 gpm at 700 W and 31.1 gpm at 120 W (Appendix C weights from memory; computed)', () => {
    const points = [
      { weight: 0.2, gpm: 64, watts: 700 },
      { weight: 0.8, gpm: 31.1, watts: 120 },
    ];

    expect(weightedEnergyFactor(points)).toBeCloseTo(9.58, 3);
  });

  it('is 2.667 for a single-speed pump of 80 gpm at 1800 W (computed)', () => {
    expect(weightedEnergyFactor([{ weight: 1, gpm: 80, watts: 1800 }])).toBeCloseTo(2.667, 3);
  });

  it('rates a model sheet at 80 per cent of its top flow and at 31.1 gpm, both on curve C', () => {
    const rated = modelEnergyFactor(pool, 3450);

    expect(rated?.points.map(({ weight }) => weight)).toEqual([0.2, 0.8]);
    expect(rated?.points[1]?.gpm).toBeCloseTo(31.1, 6);
    expect(rated?.weightedEnergyFactor).toBeGreaterThan(4);
    expect(rated?.weightedEnergyFactor).toBeLessThan(12);
  });

  it('rates nothing that does not meet curve C, or from bad numbers', () => {
    expect(modelEnergyFactor(pool, 700)).toBeUndefined();
    expect(modelEnergyFactor(pool, Number.NaN)).toBeUndefined();
    expect(weightedEnergyFactor([])).toBeUndefined();
    expect(weightedEnergyFactor([{ weight: 1, gpm: Number.NaN, watts: 100 }])).toBeUndefined();
    expect(weightedEnergyFactor([{ weight: 1, gpm: 50, watts: -100 }])).toBeUndefined();
  });
});

describe('least energy factor', () => {
  // Source: 10 CFR 431.465(f), self-priming, as quoted on casetext.com; results computed.
  it.each([
    [0.1, 5.55],
    [0.5, 3.801],
    [0.7, 3.364],
    [0.711, 7.374],
    [1, 6.59],
    [1.5, 5.657],
    [2, 4.996],
  ])('asks a self-priming pump of %s hp for %s', (horsepower, least) => {
    expect(leastEnergyFactor('self-priming', horsepower)).toBeCloseTo(least, 3);
  });

  it('meets its constants at 0.13 hp (5.552 and, from memory, 4.604)', () => {
    expect(leastEnergyFactor('self-priming', 0.130001)).toBeCloseTo(5.552, 2);
    expect(leastEnergyFactor('non-self-priming', 0.130001)).toBeCloseTo(4.604, 2);
    expect(leastEnergyFactor('non-self-priming', 0.13)).toBe(4.6);
  });

  it('asks every pressure-cleaner booster for 0.42', () => {
    expect(leastEnergyFactor('pressure-cleaner-booster', 0.4)).toBe(0.42);
  });

  it.each([Number.NaN, -0.1, 2.5, Number.POSITIVE_INFINITY])('asks nothing of %s hp', (horsepower) => {
    expect(leastEnergyFactor('self-priming', horsepower)).toBeUndefined();
  });
});
