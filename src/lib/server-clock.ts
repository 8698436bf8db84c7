/**
 * The server's clock, seen from here: "14 s ago" must not depend on a browser whose own clock is wrong. Until the
 * server has said what time it is, the browser's clock stands in.
 */
let offsetMs = 0;

/** Takes over the server's time from an answer or a frame that has just arrived. */
export function setServerNow(serverNow: number): void {
  offsetMs = serverNow - Date.now();
}

export const serverNow = (): number => Date.now() + offsetMs;
