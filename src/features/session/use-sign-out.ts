import { useMutation, useQueryClient } from '@tanstack/react-query';
import { sessionEndpoints } from '#shared/contract/http/session.ts';
import { call } from '#src/lib/api/api-client.ts';

/** Signs out; nothing that was read stays behind. */
export function useSignOut(onSignedOut: () => void) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => call(sessionEndpoints.remove, {}),
    onSuccess: () => {
      onSignedOut();
      client.clear();
    },
  });
}
