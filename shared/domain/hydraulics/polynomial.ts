/** A polynomial by ascending powers: `[a, b, c]` is a + b·x + c·x². */
export type Polynomial = readonly number[];

/**
 * The value of a polynomial at x, by Horner's rule. NaN in, NaN out; an empty polynomial is 0.
 *
 * @example evaluatePolynomial([380, -0.06, -0.0018], 200) // 296
 */
export function evaluatePolynomial(polynomial: Polynomial, x: number): number {
  let value = 0;
  for (let power = polynomial.length - 1; power >= 0; power -= 1) value = value * x + (polynomial[power] ?? 0);
  return value;
}

/** The derivative of a polynomial. @example derivative([380, -0.06, -0.0018]) // [-0.06, -0.0036] */
export const derivative = (polynomial: Polynomial): Polynomial =>
  polynomial.slice(1).map((coefficient, index) => coefficient * (index + 1));

/** The same polynomial with every coefficient multiplied. @example scalePolynomial([1, 2], 3) // [3, 6] */
export const scalePolynomial = (polynomial: Polynomial, factor: number): Polynomial =>
  polynomial.map((coefficient) => coefficient * factor);

/**
 * Where a polynomial of degree three or less turns: the real, finite roots of its derivative, ascending. A saddle
 * counts twice, a straight line turns nowhere.
 *
 * @example turningPoints([0, -3, 0, 1]) // [-1, 1]
 */
export function turningPoints(polynomial: Polynomial): number[] {
  const [c = 0, b = 0, a = 0] = derivative(polynomial);
  if (a === 0) return b === 0 ? [] : [-c / b].filter(Number.isFinite);
  const discriminant = b * b - 4 * a * c;
  if (discriminant < 0) return [];
  // The form that does not cancel: the larger root first, the other from the product of both.
  const q = -0.5 * (b + (b < 0 ? -1 : 1) * Math.sqrt(discriminant));
  return [q / a, q === 0 ? 0 : c / q].filter(Number.isFinite).sort((left, right) => left - right);
}
