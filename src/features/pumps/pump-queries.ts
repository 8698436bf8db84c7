import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { pumpEndpoints } from '#shared/contract/http/pumps.ts';
import { call } from '#src/lib/api/api-client.ts';
import { alignWindow, type TimeWindow } from './align-window.ts';
import { loadStrip } from './load-strip.ts';

const KEY = 'pumps';
const FAILED_AGAIN_MS = 15_000;

export const pumpQueries = {
  all: () => [KEY] as const,
  /** The pumps a homeowner owns, or the first few of a company. */
  mine: () =>
    queryOptions({
      queryKey: [KEY, 'mine'] as const,
      queryFn: ({ signal }) => call(pumpEndpoints.list, { query: { sort: 'name', limit: 50 }, signal }),
    }),
  detail: (pumpId: string) =>
    queryOptions({
      queryKey: [KEY, 'detail', pumpId] as const,
      queryFn: ({ signal }) => call(pumpEndpoints.read, { params: { pumpId }, signal }),
    }),
  strips: (pumpId: string) => [KEY, 'strip', pumpId] as const,
  /** Runs and plan of one pump. Rows that come into view together are asked for in one call. */
  strip: (pumpId: string, window: TimeWindow) => {
    const { from, until } = alignWindow(window);
    return queryOptions({
      queryKey: [KEY, 'strip', pumpId, from, until] as const,
      queryFn: () => loadStrip(pumpId, { from, until }),
      // A row of the wall has no button to try again with.
      refetchInterval: ({ state }) => (state.status === 'error' ? FAILED_AGAIN_MS : false),
      placeholderData: keepPreviousData,
    });
  },
};
