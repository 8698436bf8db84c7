import { infiniteQueryOptions, keepPreviousData, queryOptions } from '@tanstack/react-query';
import { alarmActEndpoints } from '#shared/contract/http/alarm-acts.ts';
import { type AlarmsQuery, alarmEndpoints } from '#shared/contract/http/alarms.ts';
import { call } from '#src/lib/api/api-client.ts';

/** What a list of alarms is narrowed to; every part is in the page's address. */
export type AlarmFilter = {
  readonly [Part in Exclude<keyof AlarmsQuery, 'cursor' | 'limit'>]?: AlarmsQuery[Part] | undefined;
};

const KEY = 'alarms';

export const alarmQueries = {
  all: () => [KEY] as const,
  lists: () => [KEY, 'list'] as const,
  list: (filter: AlarmFilter) =>
    infiniteQueryOptions({
      queryKey: [KEY, 'list', filter] as const,
      queryFn: ({ signal, pageParam }) =>
        call(alarmEndpoints.list, {
          query: pageParam === undefined ? filter : { ...filter, cursor: pageParam },
          signal,
        }),
      initialPageParam: undefined as string | undefined,
      getNextPageParam: (last) => last.nextCursor ?? undefined,
      placeholderData: keepPreviousData,
    }),
  /** Counts of everything open, whatever a list is narrowed to. */
  totals: () =>
    queryOptions({
      queryKey: [KEY, 'totals'] as const,
      queryFn: ({ signal }) => call(alarmEndpoints.list, { query: { show: 'open', limit: 1 }, signal }),
    }),
  /** The latest of one pump, in whatever state. */
  ofPump: (pumpId: string) =>
    queryOptions({
      queryKey: [KEY, 'pump', pumpId] as const,
      queryFn: ({ signal }) =>
        call(alarmEndpoints.list, { query: { show: 'all', pumpId, sort: 'newest', limit: 30 }, signal }),
    }),
  /** Whether any alarm stands at all; notes are not counted. */
  standing: () =>
    queryOptions({
      queryKey: [KEY, 'standing'] as const,
      queryFn: ({ signal }) =>
        call(alarmEndpoints.list, { query: { show: 'open', alarmClass: 'alarm', limit: 1 }, signal }),
    }),
  /** Whom an alarm may be given to. */
  technicians: () =>
    queryOptions({
      queryKey: [KEY, 'technicians'] as const,
      queryFn: ({ signal }) => call(alarmActEndpoints.technicians, { signal }),
    }),
  detail: (alarmId: string) =>
    queryOptions({
      queryKey: [KEY, 'detail', alarmId] as const,
      queryFn: ({ signal }) => call(alarmEndpoints.read, { params: { alarmId }, signal }),
    }),
};
