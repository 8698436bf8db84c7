import { queryOptions } from '@tanstack/react-query';
import { sessionEndpoints } from '#shared/contract/http/session.ts';
import { call } from '#src/lib/api/api-client.ts';
import { setServerNow } from '#src/lib/server-clock.ts';

/** Who is signed in. Asked once; renewals and changed preferences write the answer they bring. */
export const sessionQuery = () =>
  queryOptions({
    queryKey: ['session'],
    queryFn: async ({ signal }) => {
      const session = await call(sessionEndpoints.read, { signal });
      setServerNow(session.serverNow);
      return session;
    },
    staleTime: Number.POSITIVE_INFINITY,
  });
