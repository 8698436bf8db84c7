import jwt from 'jsonwebtoken';
import { z } from 'zod';
import type { Actor } from '#server/context.ts';
import { Id, Role } from '#shared/contract/primitives.ts';

/** How long an access token lasts; the browser renews before. */
export const ACCESS_MS = 10 * 60_000;

/** What every token says and every check asks for: one algorithm, our name, our purpose. */
export const TOKEN_RULES = { algorithm: 'HS256', issuer: 'millrace', audience: 'millrace-access' } as const;

/** The claims of an access token; names as short as the registered ones (RFC 7519, 4.1). */
const Claims = z.object({
  sub: Id,
  sid: Id,
  com: Id,
  cus: Id.optional(),
  rol: Role,
  nam: z.string(),
  exp: z.number(),
});

/** Signs who is signed in; lasts ten minutes from `now`. */
export function signAccessToken(
  tokenKey: string,
  actor: Omit<Actor, 'accessUntil'>,
  now: number,
): { token: string; accessUntil: number } {
  const iat = Math.floor(now / 1000);
  const exp = iat + ACCESS_MS / 1000;
  const { userId, sessionId, companyId, customerId, role, name } = actor;
  const claims = { sub: userId, sid: sessionId, com: companyId, cus: customerId, rol: role, nam: name, iat, exp };
  const { algorithm, issuer, audience } = TOKEN_RULES;
  return { token: jwt.sign(claims, tokenKey, { algorithm, issuer, audience }), accessUntil: exp * 1000 };
}

/** Who the claims of a verified token name; undefined where they are not ours or are over by our own clock. */
export function findActor(payload: unknown, now: number): Actor | undefined {
  const { data } = Claims.safeParse(payload);
  if (data === undefined || data.exp * 1000 <= now) return undefined;
  return {
    userId: data.sub,
    sessionId: data.sid,
    companyId: data.com,
    customerId: data.cus,
    role: data.rol,
    name: data.nam,
    accessUntil: data.exp * 1000,
  };
}
