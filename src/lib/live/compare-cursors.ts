/**
 * Which of two change cursors (whole numbers as text, too large for a number) is later: negative, zero or positive.
 *
 * @example compareCursors('99', '100') < 0 // true
 */
export function compareCursors(left: string, right: string): number {
  const difference = BigInt(left) - BigInt(right);
  return difference < 0n ? -1 : difference > 0n ? 1 : 0;
}
