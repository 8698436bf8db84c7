/**
 * The live connection as a person should see it. `connecting` = the first one is being made; `live`; `stale` = open
 * but silent; `broken` = lost and being made again; `offline` = the browser says that there is no network;
 * `signed-out` = the server no longer knows us.
 */
export type LinkPhase = 'connecting' | 'live' | 'stale' | 'broken' | 'offline' | 'signed-out';

/** `heardAt` = when the last frame of any kind arrived, in the browser's own time. */
export type LinkState = { readonly phase: LinkPhase; readonly heardAt: number | undefined };

/** The server sends something at least every 10 s: one beat missed is stale, two and the connection is given up. */
export const STALE_AFTER_MS = 15_000;
export const GIVE_UP_AFTER_MS = 25_000;

/**
 * What silence makes of an open link.
 *
 * @example judgeSilence(16_000) // 'stale'
 */
export function judgeSilence(silentMs: number): 'live' | 'stale' | 'dead' {
  if (silentMs >= GIVE_UP_AFTER_MS) return 'dead';
  return silentMs >= STALE_AFTER_MS ? 'stale' : 'live';
}
