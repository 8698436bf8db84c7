/** Delays between attempts, seconds; the last one holds from then on. */
const DELAYS_SECONDS = [2, 5, 15, 30, 60, 120, 300, 600];

/**
 * How long to wait after the nth failed attempt (from 1), ms: quickly at first, then every ten minutes.
 *
 * @example retryDelayMs(1) // 2000
 */
export function retryDelayMs(attempts: number): number {
  const place = Math.min(Math.max(1, attempts), DELAYS_SECONDS.length) - 1;
  return (DELAYS_SECONDS[place] ?? 600) * 1000;
}

/** An answer that no later attempt changes: the address or the mail itself is refused for good (RFC 5321, 4.2.1: 5yz). */
const REFUSED_FOR_GOOD = [550, 551, 552, 553, 554, 555];
/** A server may say so in error while it is being repaired. */
const ATTEMPTS_BEFORE_GIVING_UP = 5;

/** Whether a failed attempt is the last one. A server that cannot be reached is tried for ever. */
export function isRefusedForGood(error: unknown, attempts: number): boolean {
  if (typeof error !== 'object' || error === null || attempts < ATTEMPTS_BEFORE_GIVING_UP) return false;
  const code: unknown = 'responseCode' in error ? error.responseCode : undefined;
  return typeof code === 'number' && REFUSED_FOR_GOOD.includes(code);
}
