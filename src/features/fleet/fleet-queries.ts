import { infiniteQueryOptions, keepPreviousData, queryOptions } from '@tanstack/react-query';
import { type FleetQuery, pumpEndpoints } from '#shared/contract/http/pumps.ts';
import { call } from '#src/lib/api/api-client.ts';

/** What the wall is narrowed to; every part is in the page's address. */
export type FleetFilter = {
  readonly [Part in Exclude<keyof FleetQuery, 'cursor' | 'limit'>]?: FleetQuery[Part] | undefined;
};

const KEY = 'fleet';
const TOTALS_EVERY_MS = 30_000;

export const fleetQueries = {
  all: () => [KEY] as const,
  lists: () => [KEY, 'list'] as const,
  list: (filter: FleetFilter) =>
    infiniteQueryOptions({
      queryKey: [KEY, 'list', filter] as const,
      queryFn: ({ signal, pageParam }) =>
        call(pumpEndpoints.list, {
          query: pageParam === undefined ? filter : { ...filter, cursor: pageParam },
          signal,
        }),
      initialPageParam: undefined as string | undefined,
      getNextPageParam: (last) => last.nextCursor ?? undefined,
      placeholderData: keepPreviousData,
    }),
  /** Counts over the fleet. Pumps that are not on screen start and stop unseen: they are counted anew now and then. */
  totals: (filter: FleetFilter) =>
    queryOptions({
      queryKey: [KEY, 'totals', filter] as const,
      queryFn: ({ signal }) => call(pumpEndpoints.list, { query: { ...filter, limit: 1 }, signal }),
      refetchInterval: TOTALS_EVERY_MS,
      placeholderData: keepPreviousData,
    }),
};
