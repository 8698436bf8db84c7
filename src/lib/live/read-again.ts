import type { QueryClient, QueryFilters } from '@tanstack/react-query';

/**
 * Reads queries again whose answers may be older than news that has just come. A first answer that is still on its way
 * cannot be asked for anew: it was perhaps written before the news and would be shown for good, so it is read once more
 * when it is here.
 */
export function readAgain(client: QueryClient, filters: QueryFilters): void {
  for (const query of client.getQueryCache().findAll({ ...filters, fetchStatus: 'fetching' })) {
    if (query.state.data !== undefined) continue;
    const again = () => client.invalidateQueries({ queryKey: query.queryKey, exact: true });
    query.promise?.then(again, again);
  }
  void client.invalidateQueries(filters);
}

/** Reads those again whose answers are on their way; of the others only what the news says changes. */
export const readUnderwayAgain = (client: QueryClient, queryKey: QueryFilters['queryKey'] & {}): void =>
  readAgain(client, { queryKey, fetchStatus: 'fetching' });
