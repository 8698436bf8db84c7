import { asMachine, type Transaction } from '#server/db/transaction.ts';
import { unauthenticated } from '#server/errors.ts';
import type { Exchange } from '#server/http/mount.ts';
import type { Session } from '#shared/contract/http/session.ts';
import { openSession } from './open-session.ts';
import { hashRefreshToken, REFRESH_IDLE_MS, REUSE_WINDOW_MS, SESSION_LONGEST_MS, succeed } from './refresh-token.ts';
import {
  addRefreshToken,
  auditSession,
  findPersonById,
  findRefreshToken,
  markRefreshTokenUsed,
  type Person,
  revokeFamily,
} from './session-repository.ts';
import type { SessionServices } from './session-services.ts';

type Known = NonNullable<Awaited<ReturnType<typeof findRefreshToken>>>;

type Renewal =
  | { readonly kind: 'renewed'; readonly person: Person; readonly sessionId: string }
  | { readonly kind: 'refused' | 'replayed'; readonly sessionId?: string };

/**
 * Changes the refresh token for its successor. A token shown again within ten seconds gets the same successor; later
 * it is a stolen one or its owner's old one, nobody can tell, and the whole family ends.
 */
export async function renewSession(services: SessionServices, exchange: Exchange): Promise<Session> {
  const { machine, tokenKey, cookies, endedSessions, log } = services;
  const { request, response, requestId } = exchange;
  const token = cookies.findRefresh(request.headers.cookie);
  const renewal =
    token === undefined ? undefined : await asMachine(machine, (db) => renew(db, tokenKey, token, exchange));
  if (token !== undefined && renewal?.kind === 'renewed') {
    const { person, sessionId } = renewal;
    return openSession(services, exchange, { person, sessionId, refresh: succeed(tokenKey, token) });
  }
  if (renewal?.kind === 'replayed' && renewal.sessionId !== undefined) {
    endedSessions.end(renewal.sessionId);
    log.warn({ requestId, sessionId: renewal.sessionId }, 'a used refresh token came again; its session is over');
  }
  cookies.clear(response);
  throw unauthenticated('The session is over. Sign in again.');
}

async function renew(db: Transaction, tokenKey: string, token: string, exchange: Exchange): Promise<Renewal> {
  const { now } = exchange;
  const known = await findRefreshToken(db, hashRefreshToken(tokenKey, token));
  if (known === undefined || known.revokedAt !== null || known.expiresAt.getTime() <= now) return { kind: 'refused' };
  const sessionId = known.familyId;
  const person = await findPersonById(db, known.userId);
  if (person === undefined || person.disabledAt !== null) {
    await revokeFamily(db, sessionId, new Date(now));
    return { kind: 'refused' };
  }
  if (known.usedAt === null) {
    await markRefreshTokenUsed(db, known.id, new Date(now));
    await addSuccessor(db, known, hashRefreshToken(tokenKey, succeed(tokenKey, token)), now);
    return { kind: 'renewed', person, sessionId };
  }
  if (now - known.usedAt.getTime() <= REUSE_WINDOW_MS) return { kind: 'renewed', person, sessionId };
  await revokeFamily(db, sessionId, new Date(now));
  await auditReplay(db, known, person, exchange);
  return { kind: 'replayed', sessionId };
}

const auditReplay = (
  db: Transaction,
  { companyId, userId }: Known,
  { name }: Person,
  { now, request, requestId }: Exchange,
) =>
  auditSession(db, {
    companyId,
    userId,
    name,
    action: 'session.replayed',
    at: new Date(now),
    address: request.ip,
    requestId,
  });

function addSuccessor(
  db: Transaction,
  { companyId, userId, familyId, signedInAt }: Known,
  tokenHash: Buffer,
  now: number,
) {
  const expiresAt = Math.min(now + REFRESH_IDLE_MS, signedInAt.getTime() + SESSION_LONGEST_MS);
  const times = { signedInAt, issuedAt: new Date(now), expiresAt: new Date(expiresAt) };
  return addRefreshToken(db, { companyId, userId, familyId, tokenHash, ...times });
}
