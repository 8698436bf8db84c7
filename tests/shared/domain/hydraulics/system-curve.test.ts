import { describe, expect, it } from 'vitest';
import { findNearestSystem } from '#shared/domain/hydraulics/nearest-system-curve.ts';
import { REFERENCE_SYSTEM_CURVES, systemHead, systemK } from '#shared/domain/hydraulics/system-curve.ts';

describe('system curve', () => {
  // From memory: coefficients of reference curves A, B and C; results computed.
  it.each([
    ['a', 36, 21.64],
    ['a', 60, 60.12],
    ['b', 36, 64.8],
    ['b', 40, 80],
    ['c', 24.7, 5.003],
    ['c', 31.1, 7.931],
    ['c', 40, 13.12],
    ['c', 60, 29.52],
    ['c', 80, 52.48],
  ] as const)('asks on reference curve %s at %s gpm for %s ft', (curve, gpm, feet) => {
    expect(systemHead(REFERENCE_SYSTEM_CURVES[curve], gpm)).toBeCloseTo(feet, 2);
  });

  it('reads k back from a point', () => {
    expect(systemK(60, 29.52)).toBeCloseTo(0.0082, 9);
    expect(systemK(200, 296, 265)).toBeCloseTo(7.75e-4, 9);
  });

  it.each([
    [0, 10],
    [-5, 10],
    [10, Number.NaN],
    [Number.POSITIVE_INFINITY, 10],
    [10, 0],
  ])('has no k at %s gpm and %s ft', (gpm, feet) => {
    expect(systemK(gpm, feet)).toBeUndefined();
  });

  it('has no head for a bad flow or a system that cannot be', () => {
    expect(systemHead({ staticFeet: 0, k: 0.01 }, -1)).toBeUndefined();
    expect(systemHead({ staticFeet: 0, k: Number.NaN }, 1)).toBeUndefined();
  });
});

describe('nearest system curve', () => {
  const known = [
    { name: 'pool', staticFeet: 0, k: 0.0125 },
    { name: 'solar', staticFeet: 4, k: 0.02 },
  ];

  it('finds the valve position that a point belongs to', () => {
    expect(findNearestSystem(known, { gpm: 60, feet: 46 }, 2)).toMatchObject({ curve: { name: 'pool' }, fits: true });
    expect(findNearestSystem(known, { gpm: 50, feet: 53 }, 2)).toMatchObject({ curve: { name: 'solar' }, fits: true });
  });

  it('says by how much a point misses every known curve', () => {
    const nearest = findNearestSystem(known, { gpm: 40, feet: 60 }, 2);

    expect(nearest).toMatchObject({ curve: { name: 'solar' }, missFeet: 24, sigmas: 12, fits: false });
  });

  it('finds none among none, or for bad numbers', () => {
    expect(findNearestSystem([], { gpm: 60, feet: 46 }, 2)).toBeUndefined();
    expect(findNearestSystem(known, { gpm: Number.NaN, feet: 46 }, 2)).toBeUndefined();
    expect(findNearestSystem(known, { gpm: 60, feet: 46 }, 0)).toBeUndefined();
    expect(findNearestSystem([{ staticFeet: 0, k: -1 }], { gpm: 60, feet: 46 }, 2)).toBeUndefined();
  });
});
