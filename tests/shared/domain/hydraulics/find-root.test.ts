import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findRoot } from '#shared/domain/hydraulics/find-root.ts';

describe('bracketed root', () => {
  it('finds the square root of two', () => {
    expect(findRoot((x) => x * x - 2, 0, 2)).toBeCloseTo(Math.SQRT2, 12);
  });

  it('finds a root at either end', () => {
    expect(findRoot((x) => x, 0, 1)).toBe(0);
    expect(findRoot((x) => x - 1, 0, 1)).toBe(1);
  });

  it('stays inside its bracket whatever the curve does, in a bounded number of steps', () => {
    const steep = fc.double({ min: 0.05, max: 40, noNaN: true });
    fc.assert(
      fc.property(fc.double({ min: -9.9, max: 9.9, noNaN: true }), steep, (root, power) => {
        let calls = 0;
        const f = (x: number): number => {
          calls += 1;
          expect(Math.abs(x)).toBeLessThanOrEqual(10);
          return Math.sign(x - root) * Math.abs(x - root) ** power;
        };
        expect(Math.abs((findRoot(f, -10, 10) ?? 99) - root)).toBeLessThan(1);
        expect(calls).toBeLessThan(210);
      }),
    );
  });

  it('answers nothing without a change of sign, or for a curve that is not finite', () => {
    expect(findRoot((x) => x * x + 1, -1, 1)).toBeUndefined();
    expect(findRoot((x) => 1 / x, -1, 1)).toBeUndefined();
    expect(findRoot(() => Number.NaN, -1, 1)).toBeUndefined();
    expect(findRoot((x) => x, Number.NaN, 1)).toBeUndefined();
    expect(findRoot((x) => (Math.abs(x) < 0.9 ? Number.NaN : x), -1, 1)).toBeUndefined();
  });
});
