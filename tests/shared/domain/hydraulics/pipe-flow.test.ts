import { describe, expect, it } from 'vitest';
import {
  checkPipeVelocity,
  frictionPerHundredFeet,
  pipeVelocity,
  systemOfPipe,
} from '#shared/domain/hydraulics/pipe-flow.ts';
import { systemHead } from '#shared/domain/hydraulics/system-curve.ts';

describe('pipe flow', () => {
  const pipe = { staticFeet: 265, frictionFactor: 0.02, lengthFeet: 1255, insideInches: 0.3355 * 12, fittings: 3.79 };

  it('draws the system curve 265 + 7.75e-4·Q² (HI Data Tool, 01_sys-curves)', () => {
    // Printed from a velocity factor rounded to 1.22: within 0.3 per cent.
    expect(Math.abs((systemOfPipe(pipe)?.k ?? 0) / 7.75e-4 - 1)).toBeLessThan(0.003);
  });

  // Source: HI Data Tool, 01_sys-curves, table.
  it.each([
    [100, 273, 2.52],
    [200, 296, 5.04],
    [300, 335, 7.561],
  ])('asks at %i gpm for %i ft, at %s ft/s', (gpm, feet, velocity) => {
    const system = systemOfPipe(pipe) ?? { staticFeet: 0, k: 0 };

    expect(systemHead(system, gpm)).toBeCloseTo(feet, 0);
    expect(pipeVelocity(gpm, pipe.insideInches)).toBeCloseTo(velocity, 2);
  });

  it('loses 9.007 ft per 100 ft at 200 gpm in 3.048 in at C 140, 2.70 ft in 30 ft (engineeringtoolbox.com, Hazen-Williams)', () => {
    const loss = frictionPerHundredFeet(200, 3.048, 140) ?? 0;

    expect(loss).toBeCloseTo(9.007, 2);
    expect(0.3 * loss).toBeCloseTo(2.702, 2);
  });

  it.each([
    [36, 1.601, 7.59],
    [36, 2.058, 2.24],
    [60, 2.058, 5.76],
  ])('loses at C 150 and %i gpm in %s in: %s ft per 100 ft (computed)', (gpm, inches, feet) => {
    expect(frictionPerHundredFeet(gpm, inches)).toBeCloseTo(feet, 1);
  });

  // PVC Schedule 40 diameters: HI engineering data book; limits 6 and 8 ft/s from memory; flows computed.
  it.each([
    ['1.5', 37.6, 50.2],
    ['2', 62.2, 82.9],
    ['2.5', 88.6, 118.2],
    ['3', 137, 182.7],
  ] as const)('reaches the limits in %s inch pipe at %s and %s gpm', (size, suction, back) => {
    expect(checkPipeVelocity(30, size, 'suction')?.largestGpm).toBeCloseTo(suction, 1);
    expect(checkPipeVelocity(30, size, 'return')?.largestGpm).toBeCloseTo(back, 1);
    expect(checkPipeVelocity(suction + 0.1, size, 'suction')?.within).toBe(false);
    expect(checkPipeVelocity(suction - 0.1, size, 'suction')?.within).toBe(true);
  });

  it('answers nothing for bad numbers', () => {
    expect(pipeVelocity(Number.NaN, 2)).toBeUndefined();
    expect(pipeVelocity(10, 0)).toBeUndefined();
    expect(frictionPerHundredFeet(-1, 2)).toBeUndefined();
    expect(checkPipeVelocity(Number.POSITIVE_INFINITY, '2', 'suction')).toBeUndefined();
    expect(systemOfPipe({ ...pipe, lengthFeet: Number.NaN })).toBeUndefined();
    expect(systemOfPipe({ ...pipe, fittings: -1 })).toBeUndefined();
  });
});
