import { Passport } from 'passport';
import { Strategy } from 'passport-jwt';
import type { Actor } from '#server/context.ts';
import type { Exchange } from '#server/http/mount.ts';
import { findActor, TOKEN_RULES } from './access-token.ts';
import type { SessionServices } from './session-services.ts';

type Request = Pick<Exchange['request'], 'headers'>;

export type Authenticate = (request: Request) => Promise<Actor | undefined>;

/**
 * Finds who is signed in by the access cookie of a request, an upgrade to a live connection included. Undefined for
 * nobody: no cookie, a token that is not ours, over, or of a session that was ended.
 */
export function createAuthenticate({ tokenKey, cookies, endedSessions, now }: SessionServices): Authenticate {
  const passport = new Passport();
  const { algorithm, issuer, audience } = TOKEN_RULES;
  const options = {
    jwtFromRequest: (request: Request) => cookies.findAccess(request.headers.cookie) ?? null,
    secretOrKey: tokenKey,
    algorithms: [algorithm],
    issuer,
    audience,
  };
  passport.use(
    new Strategy(options, (payload: unknown, done) => {
      const actor = findActor(payload, now());
      done(null, actor !== undefined && !endedSessions.has(actor.sessionId) ? actor : false);
    }),
  );
  return (request) =>
    new Promise((resolve, reject) => {
      const decide = (error: unknown, actor: Actor | false | undefined) =>
        error ? reject(error) : resolve(actor || undefined);
      passport.authenticate('jwt', { session: false }, decide)(request, undefined, reject);
    });
}
