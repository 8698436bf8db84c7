import { useMutation, useQueryClient } from '@tanstack/react-query';
import { sessionEndpoints } from '#shared/contract/http/session.ts';
import { call } from '#src/lib/api/api-client.ts';
import { setServerNow } from '#src/lib/server-clock.ts';
import { chooseTheme } from '#src/lib/theme.ts';
import { sessionQuery } from './session-queries.ts';

/** Signs in; what another person's session had read is forgotten first. */
export function useSignIn() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: { email: string; password: string }) => call(sessionEndpoints.create, { body }),
    onSuccess: (session) => {
      client.clear();
      setServerNow(session.serverNow);
      chooseTheme(session.preferences.theme);
      client.setQueryData(sessionQuery().queryKey, session);
    },
  });
}
