import { asMachine } from '#server/db/transaction.ts';
import type { Exchange } from '#server/http/mount.ts';
import type { Authenticate } from './authenticate.ts';
import { hashRefreshToken } from './refresh-token.ts';
import { auditSession, findRefreshToken, revokeFamily } from './session-repository.ts';
import type { SessionServices } from './session-services.ts';

/** Ends the session of whichever cookie came, at once and for every tab; without one there is nothing to end. */
export async function signOut(
  { machine, tokenKey, cookies, endedSessions }: SessionServices,
  authenticate: Authenticate,
  { request, response, requestId, now }: Exchange,
): Promise<void> {
  cookies.clear(response);
  const actor = await authenticate(request);
  const token = cookies.findRefresh(request.headers.cookie);
  const at = new Date(now);
  const sessionId = await asMachine(machine, async (db) => {
    const known = token === undefined ? undefined : await findRefreshToken(db, hashRefreshToken(tokenKey, token));
    const familyId = known?.familyId ?? actor?.sessionId;
    const person = known ?? actor;
    if (familyId === undefined || person === undefined) return undefined;
    await revokeFamily(db, familyId, at);
    const { companyId, userId } = person;
    const entry = {
      companyId,
      userId,
      name: actor?.name,
      action: 'session.ended',
      at,
      address: request.ip,
      requestId,
    } as const;
    await auditSession(db, entry);
    return familyId;
  });
  if (sessionId !== undefined) endedSessions.end(sessionId);
}
