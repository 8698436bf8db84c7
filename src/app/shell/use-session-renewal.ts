import { useQueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import { sessionEndpoints } from '#shared/contract/http/session.ts';
import { sessionQuery } from '#src/features/session/session-queries.ts';
import { call } from '#src/lib/api/api-client.ts';
import { serverNow } from '#src/lib/server-clock.ts';

const AHEAD_MS = 30_000;
const LONGEST_TIMER_MS = 2_000_000_000;

/** Renews the session a little before its access ends, so that neither a call nor the live connection stumbles. */
export function useSessionRenewal(accessUntil: number | undefined): void {
  const client = useQueryClient();
  useEffect(() => {
    if (accessUntil === undefined) return;
    const wait = Math.min(LONGEST_TIMER_MS, Math.max(1000, accessUntil - serverNow() - AHEAD_MS));
    const timer = setTimeout(() => {
      call(sessionEndpoints.renew, {}).then(
        (session) => client.setQueryData(sessionQuery().queryKey, session),
        // The next call finds out what is the matter and says so.
        () => undefined,
      );
    }, wait);
    return () => clearTimeout(timer);
  }, [accessUntil, client]);
}
