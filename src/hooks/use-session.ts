import { createContext, useContext } from 'react';
import type { Session } from '#shared/contract/http/session.ts';

export const SessionContext = createContext<Session | undefined>(undefined);

/** Who is signed in. Only below the shell, which lets nobody in without a session. */
export function useSession(): Session {
  const session = useContext(SessionContext);
  if (session === undefined) throw new Error('useSession needs the shell above it');
  return session;
}
