import type pg from 'pg';
import type { Logger } from 'pino';
import type { EndedSessions } from './ended-sessions.ts';
import type { SessionCookies } from './session-cookies.ts';
import type { SignInThrottle } from './sign-in-throttle.ts';

/** What signing in, renewing and signing out work with. */
export type SessionServices = {
  readonly machine: pg.Pool;
  readonly tokenKey: string;
  readonly cookies: SessionCookies;
  readonly endedSessions: EndedSessions;
  readonly throttle: SignInThrottle;
  /** Whether the demo's printed password opens anything. */
  readonly isDemo: boolean;
  readonly now: () => number;
  readonly log: Logger;
};
