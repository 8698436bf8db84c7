import fc from 'fast-check';
import { evaluate, derivative as symbolicDerivative } from 'mathjs';
import { describe, expect, it } from 'vitest';
import {
  derivative,
  evaluatePolynomial,
  scalePolynomial,
  turningPoints,
} from '#shared/domain/hydraulics/polynomial.ts';

const coefficient = fc.integer({ min: -10_000, max: 10_000 }).map((hundredths) => hundredths / 100);

describe('polynomial', () => {
  it('has the value and slope that a general algebra library gives', () => {
    const text = '380 - 0.06 x - 0.0018 x^2 + 0.00001 x^3';
    const made = [380, -0.06, -0.0018, 0.00001];

    expect(evaluatePolynomial(made, 200)).toBeCloseTo(evaluate(text, { x: 200 }), 9);
    expect(evaluatePolynomial(derivative(made), 200)).toBeCloseTo(
      symbolicDerivative(text, 'x').evaluate({ x: 200 }),
      9,
    );
  });

  it('turns where its slope is zero, in ascending order', () => {
    fc.assert(
      fc.property(fc.array(coefficient, { minLength: 1, maxLength: 4 }), (made) => {
        const turns = turningPoints(made);
        const slope = derivative(made);
        for (const x of turns.filter((at) => Math.abs(at) < 1e3)) {
          const scale = slope.reduce((sum, value, power) => sum + Math.abs(value * x ** power), 0);
          expect(Math.abs(evaluatePolynomial(slope, x))).toBeLessThanOrEqual(1e-9 * scale + 1e-300);
        }
        expect(turns).toEqual([...turns].sort((left, right) => left - right));
      }),
    );
  });

  it('turns at both ends of a cubic, nowhere on a line, once on a parabola', () => {
    expect(turningPoints([0, -3, 0, 1])).toEqual([-1, 1]);
    expect(turningPoints([1, 2])).toEqual([]);
    expect(turningPoints([0, -4, 1])).toEqual([2]);
    expect(turningPoints([0, 1, 0, 1])).toEqual([]);
  });

  it('scales every coefficient', () => {
    expect(scalePolynomial([1, -2, 3], 2)).toEqual([2, -4, 6]);
  });
});
