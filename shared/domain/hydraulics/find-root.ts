/** A root is sought until the bracket is this share of its first width; 1e-12 of a flow is far under any meter. */
const RELATIVE_WIDTH = 1e-12;
const MOST_STEPS = 200;

const differs = (left: number, right: number): boolean => left > 0 !== right > 0;

/**
 * The x between `low` and `high` where a continuous function is zero, by false position kept inside a shrinking
 * bracket and halved whenever it is slow: it cannot leave the bracket, so it cannot diverge. undefined when the ends
 * do not lie on both sides of zero, or the function gives a number that is not finite.
 *
 * @example findRoot((x) => x * x - 2, 0, 2) // 1.4142135623730951
 * Source: bracketed false position with bisection as its safeguard (Dekker).
 */
export function findRoot(f: (x: number) => number, low: number, high: number): number | undefined {
  let [left, right] = [Math.min(low, high), Math.max(low, high)];
  let [atLeft, atRight] = [f(left), f(right)];
  if (![left, right, atLeft, atRight].every(Number.isFinite)) return undefined;
  if (atLeft === 0) return left;
  if (atRight === 0) return right;
  if (!differs(atLeft, atRight)) return undefined;

  const tolerance = Math.max((right - left) * RELATIVE_WIDTH, Number.MIN_VALUE);
  for (let step = 0; step < MOST_STEPS && right - left > tolerance; step += 1) {
    const width = right - left;
    const secant = left - (atLeft * width) / (atRight - atLeft);
    // Every third step halves: false position alone can creep from one side.
    const inside = step % 3 !== 2 && secant > left && secant < right;
    const middle = inside ? secant : left + width / 2;
    if (middle <= left || middle >= right) break;
    const atMiddle = f(middle);
    if (!Number.isFinite(atMiddle)) return undefined;
    if (atMiddle === 0) return middle;
    if (differs(atLeft, atMiddle)) [right, atRight] = [middle, atMiddle];
    else [left, atLeft] = [middle, atMiddle];
  }
  return Math.abs(atLeft) < Math.abs(atRight) ? left : right;
}
