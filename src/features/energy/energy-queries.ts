import { infiniteQueryOptions, keepPreviousData, queryOptions } from '@tanstack/react-query';
import { energyEndpoints } from '#shared/contract/http/energy.ts';
import { fleetEnergyEndpoints, type PadMonthQuery } from '#shared/contract/http/energy-fleet.ts';
import { type ProgramsQuery, programEndpoints } from '#shared/contract/http/energy-programs.ts';
import { call } from '#src/lib/api/api-client.ts';
import type { MonthText } from './local-month.ts';

const KEY = 'energy';
/** Figures grow with every reading; once in a while is often enough for sums. */
const AGAIN_MS = 120_000;

/** Local days, half-open, by day or by month. */
export type EnergySpanAsked = {
  readonly from: string;
  readonly until: string;
  readonly by: 'day' | 'month';
  /** Whether now lies in it. */
  readonly growing: boolean;
};

const usual = (growing: boolean) => ({
  refetchInterval: growing ? AGAIN_MS : (false as const),
  placeholderData: keepPreviousData,
});

export type PadFilter = Pick<PadMonthQuery, 'sort'> & { readonly q: string | undefined };
export type ProgramFilter = Pick<ProgramsQuery, 'show' | 'sort'> & { readonly q: string | undefined };

export const energyQueries = {
  pump: (pumpId: string, { growing, ...query }: EnergySpanAsked) =>
    queryOptions({
      queryKey: [KEY, 'pump', pumpId, query] as const,
      queryFn: ({ signal }) => call(energyEndpoints.pump, { params: { pumpId }, query, signal }),
      ...usual(growing),
    }),
  pad: (padId: string, { growing, ...query }: EnergySpanAsked) =>
    queryOptions({
      queryKey: [KEY, 'pad', padId, query] as const,
      queryFn: ({ signal }) => call(energyEndpoints.pad, { params: { padId }, query, signal }),
      ...usual(growing),
    }),
  padHours: (padId: string, month: MonthText, growing: boolean) =>
    queryOptions({
      queryKey: [KEY, 'pad-hours', padId, month] as const,
      queryFn: ({ signal }) => call(energyEndpoints.padHours, { params: { padId }, query: { month }, signal }),
      ...usual(growing),
    }),
  fleet: (month: MonthText, growing: boolean) =>
    queryOptions({
      queryKey: [KEY, 'fleet', month] as const,
      queryFn: ({ signal }) => call(fleetEnergyEndpoints.month, { query: { month }, signal }),
      ...usual(growing),
    }),
  fleetHours: (month: MonthText, growing: boolean) =>
    queryOptions({
      queryKey: [KEY, 'fleet-hours', month] as const,
      queryFn: ({ signal }) => call(fleetEnergyEndpoints.hours, { query: { month }, signal }),
      ...usual(growing),
    }),
  pads: (month: MonthText, filter: PadFilter) =>
    infiniteQueryOptions({
      queryKey: [KEY, 'pads', month, filter] as const,
      queryFn: ({ signal, pageParam }) =>
        call(fleetEnergyEndpoints.pads, { query: { month, ...filter, cursor: pageParam }, signal }),
      initialPageParam: undefined as string | undefined,
      getNextPageParam: (last) => last.nextCursor ?? undefined,
      placeholderData: keepPreviousData,
    }),
  programs: (filter: ProgramFilter) =>
    infiniteQueryOptions({
      queryKey: [KEY, 'programs', filter] as const,
      queryFn: ({ signal, pageParam }) =>
        call(programEndpoints.list, { query: { ...filter, cursor: pageParam, limit: 10 }, signal }),
      initialPageParam: undefined as string | undefined,
      getNextPageParam: (last) => last.nextCursor ?? undefined,
      placeholderData: keepPreviousData,
    }),
  advice: (pumpId: string) =>
    queryOptions({
      queryKey: [KEY, 'advice', pumpId] as const,
      queryFn: ({ signal }) => call(programEndpoints.pump, { params: { pumpId }, signal }),
    }),
};
