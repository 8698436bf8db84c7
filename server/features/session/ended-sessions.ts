import { ACCESS_MS } from './access-token.ts';

/**
 * Sessions that ended while an access token of theirs may still be alive: such a token is refused at once, and whoever
 * holds a live connection for it is told. An entry is needed for as long as a token lasts, no longer.
 */
export type EndedSessions = {
  readonly end: (sessionId: string) => void;
  readonly has: (sessionId: string) => boolean;
  /** Calls back for every session that ends from now on; what is returned stops that. */
  readonly onEnded: (listener: (sessionId: string) => void) => () => void;
};

export function createEndedSessions(now: () => number): EndedSessions {
  const forgetAt = new Map<string, number>();
  const listeners = new Set<(sessionId: string) => void>();
  const forget = () => {
    for (const [sessionId, at] of forgetAt) if (at <= now()) forgetAt.delete(sessionId);
  };
  return {
    end: (sessionId) => {
      forget();
      forgetAt.set(sessionId, now() + ACCESS_MS);
      for (const listener of listeners) listener(sessionId);
    },
    has: (sessionId) => forgetAt.has(sessionId),
    onEnded: (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
}
