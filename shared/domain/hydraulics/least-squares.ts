import type { Polynomial } from './polynomial.ts';

/** A fitted polynomial, and the standard deviation of what it leaves over (0 when it has no point to spare). */
export type PolynomialFit = { readonly coefficients: Polynomial; readonly sigma: number };

/** Solves a small square system by elimination with partial pivoting; undefined when it has no single answer. */
function solveLinear(matrix: readonly (readonly number[])[], right: readonly number[]): number[] | undefined {
  const rows = matrix.map((row, index) => [...row, right[index] ?? 0]);
  const size = rows.length;
  const at = (row: number, column: number): number => rows[row]?.[column] ?? 0;
  for (let column = 0; column < size; column += 1) {
    let pivot = column;
    for (let row = column + 1; row < size; row += 1)
      if (Math.abs(at(row, column)) > Math.abs(at(pivot, column))) pivot = row;
    if (!(Math.abs(at(pivot, column)) > 1e-12)) return undefined;
    const [from, to] = [rows[pivot] ?? [], rows[column] ?? []];
    rows[column] = from;
    rows[pivot] = to;
    for (let row = 0; row < size; row += 1) {
      if (row === column) continue;
      const factor = at(row, column) / at(column, column);
      rows[row] = (rows[row] ?? []).map((value, index) => value - factor * at(column, index));
    }
  }
  return rows.map((_, row) => at(row, size) / at(row, row));
}

const sumOf = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0);

/**
 * Fits y over x by ordinary least squares with the given powers of x (`[0, 2]` is a + c·x²). x is scaled to its
 * largest value, so that the normal equations stay well conditioned up to the cube. Coefficients come back by
 * ascending power, 0 where a power was left out. undefined for numbers that are not finite, fewer points than powers,
 * or x that do not tell the powers apart.
 *
 * @example fitPowers([0, 1, 2], [1, 2, 5], [0, 2])?.coefficients // [1, 0, 1]
 * Source: the normal equations of ordinary least squares.
 */
export function fitPowers(
  xs: readonly number[],
  ys: readonly number[],
  powers: readonly number[],
): PolynomialFit | undefined {
  const scale = xs.reduce((largest, x) => Math.max(largest, Math.abs(x)), 0);
  if (xs.length !== ys.length || xs.length < powers.length || powers.length === 0) return undefined;
  if (!(scale > 0) || ![...xs, ...ys].every(Number.isFinite)) return undefined;

  const basis = xs.map((x) => powers.map((power) => (x / scale) ** power));
  const normal = powers.map((_, i) => powers.map((__, j) => sumOf(basis.map((row) => (row[i] ?? 0) * (row[j] ?? 0)))));
  const right = powers.map((_, i) => sumOf(basis.map((row, point) => (row[i] ?? 0) * (ys[point] ?? 0))));
  const solution = solveLinear(normal, right);
  if (solution === undefined || !solution.every(Number.isFinite)) return undefined;

  const left = basis.map((row, point) => (ys[point] ?? 0) - sumOf(row.map((value, i) => value * (solution[i] ?? 0))));
  const spare = xs.length - powers.length;
  const coefficients = Array.from({ length: Math.max(...powers) + 1 }, () => 0);
  for (const [i, power] of powers.entries()) coefficients[power] = (solution[i] ?? 0) / scale ** power;
  return { coefficients, sigma: spare > 0 ? Math.sqrt(sumOf(left.map((value) => value * value)) / spare) : 0 };
}
