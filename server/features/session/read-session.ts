import type { Context } from '#server/context.ts';
import { unauthenticated } from '#server/errors.ts';
import type { Session } from '#shared/contract/http/session.ts';
import { presentSession } from './present-session.ts';
import { findPersonById } from './session-repository.ts';

/** Who is signed in. */
export async function readSession({ db, actor, now }: Context): Promise<Session> {
  const person = await findPersonById(db, actor.userId);
  if (person === undefined) throw unauthenticated();
  return presentSession(person, { accessUntil: actor.accessUntil, serverNow: now });
}
