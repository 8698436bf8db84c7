import type { z } from 'zod';
import type { Context } from '#server/context.ts';
import type { Session, UpdatePreferences } from '#shared/contract/http/session.ts';
import { readSession } from './read-session.ts';
import { savePreferences } from './session-repository.ts';

/** Changes the preferences that are given and leaves the others. */
export async function updatePreferences(
  context: Context,
  changed: z.output<typeof UpdatePreferences>,
): Promise<Session> {
  await savePreferences(context.db, context.actor.userId, changed);
  return readSession(context);
}
