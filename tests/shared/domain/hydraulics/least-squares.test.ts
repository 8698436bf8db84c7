import fc from 'fast-check';
import { inv, multiply, transpose } from 'mathjs';
import { levenbergMarquardt } from 'ml-levenberg-marquardt';
import { describe, expect, it } from 'vitest';
import { fitPowers } from '#shared/domain/hydraulics/least-squares.ts';
import { evaluatePolynomial } from '#shared/domain/hydraulics/polynomial.ts';
import { HI_TABLE } from './sample-wet-ends.ts';

const flows = HI_TABLE.map(([gpm]) => gpm);
const heads = HI_TABLE.map(([, feet]) => feet);

describe('least squares', () => {
  it('gives back the polynomial that made the points', () => {
    const coefficient = fc.double({ min: -50, max: 50, noNaN: true });
    fc.assert(
      fc.property(fc.tuple(coefficient, coefficient, coefficient, coefficient), (made) => {
        const xs = [0, 0.5, 1, 1.5, 2, 3];
        const fit = fitPowers(
          xs,
          xs.map((x) => evaluatePolynomial(made, x)),
          [0, 1, 2, 3],
        );
        for (const [power, value] of made.entries()) expect(fit?.coefficients[power]).toBeCloseTo(value, 6);
        expect(fit?.sigma).toBeLessThan(1e-6);
      }),
    );
  });

  it('agrees with the pseudo-inverse of a general matrix library on the HI table', () => {
    const x = flows.map((gpm) => [1, gpm / 1000, (gpm / 1000) ** 2]);
    const pseudo = multiply(inv(multiply(transpose(x), x)), transpose(x));
    const expected = multiply(pseudo, heads as number[]) as unknown as number[];
    const fit = fitPowers(flows, heads, [0, 1, 2]);

    for (const power of [0, 1, 2])
      expect(fit?.coefficients[power]).toBeCloseTo((expected[power] ?? 0) / 1000 ** power, 9);
  });

  it('leaves no more over than a general least-squares solver on the HI table', () => {
    const scaled = flows.map((gpm) => gpm / 1000);
    const solved = levenbergMarquardt(
      { x: scaled, y: heads as number[] },
      ([a = 0, b = 0, c = 0]) =>
        (x) =>
          a + b * x + c * x * x,
      {
        initialValues: [200, 0, -50],
        maxIterations: 500,
        errorTolerance: 1e-12,
      },
    );
    const fit = fitPowers(flows, heads, [0, 1, 2]);

    const squares = (values: number[]): number =>
      flows.reduce((sum, gpm, index) => sum + ((heads[index] ?? 0) - evaluatePolynomial(values, gpm)) ** 2, 0);
    const [a = 0, b = 0, c = 0] = solved.parameterValues;
    expect(squares([...(fit?.coefficients ?? [])])).toBeLessThanOrEqual(squares([a, b / 1000, c / 1e6]) * (1 + 1e-9));
    expect(fit?.coefficients[0]).toBeCloseTo(a, 1);
  });

  it.each([
    ['fewer points than powers', [1, 2], [1, 2], [0, 1, 2]],
    ['one x only', [2, 2, 2], [1, 2, 3], [0, 1]],
    ['x all zero', [0, 0, 0], [1, 2, 3], [0, 1]],
    ['NaN', [0, 1, Number.NaN], [1, 2, 3], [0, 1]],
    ['infinite y', [0, 1, 2], [1, Number.POSITIVE_INFINITY, 3], [0, 1]],
    ['no powers', [0, 1], [1, 2], []],
  ])('answers nothing for %s', (_, xs, ys, powers) => {
    expect(fitPowers(xs, ys, powers)).toBeUndefined();
  });
});
