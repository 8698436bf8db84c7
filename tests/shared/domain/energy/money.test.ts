import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { apportionMinorUnits, minorDigits, toMinorUnits } from '#shared/domain/energy/money.ts';

describe('money', () => {
  it.each([
    ['USD', 2],
    ['JPY', 0],
    ['KWD', 3],
    ['nonsense', 2],
  ])('knows the decimals of %s', (currency, digits) => {
    expect(minorDigits(currency)).toBe(digits);
  });

  it.each([
    [1_234_999, 'USD', 123],
    [1_235_000, 'USD', 124],
    [-1_235_000, 'USD', -124],
    [1_499_999, 'JPY', 1],
    [-1, 'USD', 0],
  ])('rounds %i micros of %s half away from zero to %i', (micros, currency, units) => {
    expect(toMinorUnits(micros, currency)).toBe(units);
  });

  it('rounds a half that binary sums leave a hair short', () => {
    expect(toMinorUnits((0.1 + 0.7) * 1e6 + 5000 - 800_000, 'USD')).toBe(1);
  });

  it('shares a sum out so that the parts add up to it', () => {
    expect(apportionMinorUnits([3_333_333, 3_333_333, 3_333_334], 'USD')).toEqual([333, 333, 334]);
    expect(apportionMinorUnits([5000, 5000], 'USD')).toEqual([1, 0]);
    expect(apportionMinorUnits([], 'USD')).toEqual([]);

    const parts = fc.array(fc.integer({ min: -1e9, max: 1e12 }), { minLength: 1, maxLength: 12 });
    fc.assert(
      fc.property(parts, fc.constantFrom('USD', 'JPY'), (micros, currency) => {
        const units = apportionMinorUnits(micros, currency) ?? [];
        const whole = toMinorUnits(
          micros.reduce((sum, part) => sum + part, 0),
          currency,
        );
        expect(units.reduce((sum, part) => sum + part, 0)).toBe(whole);
        for (const [index, part] of units.entries())
          expect(Math.abs(part - ((micros[index] ?? 0) / 1e6) * 10 ** minorDigits(currency))).toBeLessThanOrEqual(1);
      }),
    );
  });

  it.each([Number.NaN, Number.POSITIVE_INFINITY])('gives nothing for %s', (bad) => {
    expect(toMinorUnits(bad, 'USD')).toBeUndefined();
    expect(apportionMinorUnits([1, bad], 'USD')).toBeUndefined();
  });
});
