/**
 * The server's clock, seen from here: "14 s ago" must not depend on a browser whose own clock is wrong. Until the
 * server has said what time it is, the browser's clock stands in.
 */
let offsetMs = 0;

/** Takes over the server's time from an answer or a frame that has just arrived. */
export function setServerNow(serverNow: number): void {
  offsetMs = serverNow - Date.now();
}

/** An instant of the browser's clock, as the server's clock showed it. */
export const asServerTime = (browserAt: number): number => browserAt + offsetMs;

export const serverNow = (): number => Date.now() + offsetMs;
