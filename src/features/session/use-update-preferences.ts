import { useMutation, useQueryClient } from '@tanstack/react-query';
import { type Preferences, sessionEndpoints } from '#shared/contract/http/session.ts';
import { call } from '#src/lib/api/api-client.ts';
import { chooseTheme } from '#src/lib/theme.ts';
import { sessionQuery } from './session-queries.ts';

/** Changes one's own preferences: the screen follows at once, and goes back when the server refuses. */
export function useUpdatePreferences() {
  const client = useQueryClient();
  const key = sessionQuery().queryKey;
  return useMutation({
    mutationFn: (body: Partial<Preferences>) => call(sessionEndpoints.updatePreferences, { body }),
    onMutate: (change) => {
      const before = client.getQueryData(key);
      if (before !== undefined) {
        client.setQueryData(key, { ...before, preferences: { ...before.preferences, ...change } });
      }
      if (change.theme !== undefined) chooseTheme(change.theme);
      return before;
    },
    onSuccess: (session) => client.setQueryData(key, session),
    onError: (_error, _change, before) => {
      if (before === undefined) return;
      client.setQueryData(key, before);
      chooseTheme(before.preferences.theme);
    },
  });
}
