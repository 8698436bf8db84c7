import { queryOptions } from '@tanstack/react-query';
import { pumpEndpoints } from '#shared/contract/http/pumps.ts';
import { type TariffShape, tariffEndpoints } from '#shared/contract/http/tariffs.ts';
import { call } from '#src/lib/api/api-client.ts';

export const TARIFFS_KEY = 'tariffs';
const FOUND_PADS = 8;

export const tariffQueries = {
  list: () =>
    queryOptions({ queryKey: [TARIFFS_KEY], queryFn: ({ signal }) => call(tariffEndpoints.list, { signal }) }),
  read: (tariffId: string) =>
    queryOptions({
      queryKey: [TARIFFS_KEY, 'one', tariffId],
      queryFn: ({ signal }) => call(tariffEndpoints.read, { params: { tariffId }, signal }),
      enabled: tariffId !== '',
    }),
  companyTerms: () =>
    queryOptions({
      queryKey: [TARIFFS_KEY, 'terms'],
      queryFn: ({ signal }) => call(tariffEndpoints.companyTerms, { signal }),
    }),
  padTerms: (padId: string) =>
    queryOptions({
      queryKey: [TARIFFS_KEY, 'terms', padId],
      queryFn: ({ signal }) => call(tariffEndpoints.padTerms, { params: { padId }, signal }),
    }),
  pads: () =>
    queryOptions({
      queryKey: [TARIFFS_KEY, 'pads'],
      queryFn: ({ signal }) => call(tariffEndpoints.padsWithTerms, { signal }),
    }),
  findPads: (q: string) =>
    queryOptions({
      queryKey: [TARIFFS_KEY, 'find', q],
      queryFn: ({ signal }) => call(pumpEndpoints.list, { query: { q, sort: 'name', limit: FOUND_PADS }, signal }),
      enabled: q.trim() !== '',
    }),
  carbon: () =>
    queryOptions({
      queryKey: [TARIFFS_KEY, 'carbon'],
      queryFn: ({ signal }) => call(tariffEndpoints.carbon, { signal }),
    }),
  /** The server's judgement of a tariff that is being written; asked again for each other content. */
  check: (shape: TariffShape | undefined) =>
    queryOptions({
      queryKey: ['tariff-check', shape],
      queryFn: ({ signal }) => call(tariffEndpoints.check, { body: { tariff: shape as TariffShape }, signal }),
      enabled: shape !== undefined,
      placeholderData: (before) => before,
      staleTime: Number.POSITIVE_INFINITY,
      gcTime: 60_000,
    }),
};
