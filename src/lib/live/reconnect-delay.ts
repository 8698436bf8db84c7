const FIRST_MS = 500;
const LONGEST_MS = 15_000;

/**
 * How long to wait before try number `attempt` (0 = the first after a break), doubling up to 15 s. `chance` (0 to 1)
 * spreads a whole fleet of browsers over the second half of the wait, so that a server that comes back is not stormed.
 *
 * @example reconnectDelay(0, 1) // 500
 * @example reconnectDelay(9, 0) // 7500
 */
export function reconnectDelay(attempt: number, chance: number): number {
  const longest = Math.min(LONGEST_MS, FIRST_MS * 2 ** Math.min(attempt, 10));
  return longest / 2 + (longest / 2) * chance;
}
