import type { Exchange } from '#server/http/mount.ts';
import type { Session } from '#shared/contract/http/session.ts';
import { signAccessToken } from './access-token.ts';
import { presentSession } from './present-session.ts';
import type { Person } from './session-repository.ts';
import type { SessionServices } from './session-services.ts';

/** Hands a person both cookies and answers who they are. */
export function openSession(
  { tokenKey, cookies }: SessionServices,
  { response, now }: Exchange,
  { person, sessionId, refresh }: { readonly person: Person; readonly sessionId: string; readonly refresh: string },
): Session {
  const { userId, companyId, role, name } = person;
  const actor = { userId, companyId, role, name, customerId: person.customerId ?? undefined, sessionId };
  const { token, accessUntil } = signAccessToken(tokenKey, actor, now);
  cookies.set(response, { access: token, refresh });
  return presentSession(person, { accessUntil, serverNow: now });
}
