import { newId } from '#server/db/new-id.ts';
import { DEMO_PASSWORD } from '#server/db/seed/seed-demo.ts';
import { asMachine } from '#server/db/transaction.ts';
import { unauthenticated } from '#server/errors.ts';
import type { Exchange } from '#server/http/mount.ts';
import type { CreateSession, Session } from '#shared/contract/http/session.ts';
import { openSession } from './open-session.ts';
import { isPassword } from './password.ts';
import { hashRefreshToken, newRefreshToken, REFRESH_IDLE_MS } from './refresh-token.ts';
import { addRefreshToken, auditSession, findPersonByEmail, type SessionAudit } from './session-repository.ts';
import type { SessionServices } from './session-services.ts';

/**
 * Signs a person in. Unknown, disabled and known accounts take the same work and get the same answer, so that nobody
 * learns who has an account.
 */
export async function signIn(
  services: SessionServices,
  exchange: Exchange,
  { email, password }: CreateSession,
): Promise<Session> {
  const { machine, throttle, isDemo, tokenKey } = services;
  const { request, requestId, now } = exchange;
  const address = request.ip ?? 'unknown';
  await throttle.attempt(email, address);
  const person = await asMachine(machine, (db) => findPersonByEmail(db, email));
  const isEnabled = person?.disabledAt === null;
  const matches = await isPassword(isEnabled ? person.passwordHash : undefined, password);
  const isAllowed = matches && (isDemo || password !== DEMO_PASSWORD);
  const at = new Date(now);
  const audit = (action: SessionAudit['action'], { companyId, userId, name }: NonNullable<typeof person>) => ({
    companyId,
    userId,
    name,
    action,
    at,
    address,
    requestId,
  });
  if (person === undefined || !isAllowed) {
    if (person !== undefined) await asMachine(machine, (db) => auditSession(db, audit('session.refused', person)));
    throw unauthenticated('The e-mail address or the password is not right.');
  }
  await throttle.forgive(email, address);
  const [sessionId, refresh] = [newId(now), newRefreshToken()];
  await asMachine(machine, async (db) => {
    const { companyId, userId } = person;
    const tokenHash = hashRefreshToken(tokenKey, refresh);
    const times = { signedInAt: at, issuedAt: at, expiresAt: new Date(now + REFRESH_IDLE_MS) };
    await addRefreshToken(db, { companyId, userId, familyId: sessionId, tokenHash, ...times });
    await auditSession(db, audit('session.created', person));
  });
  return openSession(services, exchange, { person, sessionId, refresh });
}
