import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query';
import { isApiError } from './api/api-error.ts';

const MOST_RETRIES = 2;

/** `onUnauthenticated` runs when the server no longer knows us and no renewal helped. */
export function createQueryClient(onUnauthenticated: () => void): QueryClient {
  const watch = (error: unknown) => {
    if (isApiError(error, 'unauthenticated')) onUnauthenticated();
  };
  return new QueryClient({
    queryCache: new QueryCache({ onError: watch }),
    mutationCache: new MutationCache({ onError: watch }),
    defaultOptions: {
      queries: {
        // The live connection keeps what is on screen true; it also knows when to read everything again.
        staleTime: 60_000,
        refetchOnWindowFocus: false,
        refetchOnReconnect: false,
        retry: (count, error) => count < MOST_RETRIES && isApiError(error, 'unreachable', 'unavailable'),
      },
    },
  });
}
