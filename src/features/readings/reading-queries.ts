import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { pumpEndpoints } from '#shared/contract/http/pumps.ts';
import { call } from '#src/lib/api/api-client.ts';

export type ReadingWindow = { readonly from: number; readonly until: number };

const WIDTH = 720;
const REREAD_MS = 20_000;

export const readingQueries = {
  /** Chart columns of a pump; a window that holds now is read again while it is on screen. */
  series: (pumpId: string, { from, until }: ReadingWindow, growing: boolean) =>
    queryOptions({
      queryKey: ['readings', pumpId, from, until] as const,
      queryFn: ({ signal }) =>
        call(pumpEndpoints.readings, { params: { pumpId }, query: { from, until, width: WIDTH }, signal }),
      refetchInterval: growing ? REREAD_MS : false,
      placeholderData: keepPreviousData,
    }),
};
