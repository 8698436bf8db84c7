/**
 * The numbers of the closed inputs in a mask, bit 0 = input 1.
 *
 * @example listClosed(0b101) // [1, 3]
 */
export function listClosed(mask: number): number[] {
  const closed: number[] = [];
  for (let input = 1, rest = mask; rest > 0; input += 1, rest = Math.floor(rest / 2)) {
    if (rest % 2 === 1) closed.push(input);
  }
  return closed;
}
