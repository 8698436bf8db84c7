import { queryOptions } from '@tanstack/react-query';
import { backtestEndpoints } from '#shared/contract/http/backtests.ts';
import { pumpEndpoints } from '#shared/contract/http/pumps.ts';
import { type RuleLayer, type RuleScope, ruleEndpoints } from '#shared/contract/http/rules.ts';
import { call } from '#src/lib/api/api-client.ts';

const KEY = 'rules';
const FOLLOW_EVERY_MS = 700;
const FOUND_PUMPS = 8;

const isUnderway = (state: string | undefined): boolean => state === 'waiting' || state === 'running';

export const ruleQueries = {
  all: () => queryOptions({ queryKey: [KEY], queryFn: ({ signal }) => call(ruleEndpoints.list, { signal }) }),
  /** One pump, whether anything is set for it or not. */
  ofPump: (pumpId: string) =>
    queryOptions({
      queryKey: [KEY, 'pump', pumpId],
      queryFn: ({ signal }) => call(ruleEndpoints.readPump, { params: { pumpId }, signal }),
    }),
  findPumps: (q: string) =>
    queryOptions({
      queryKey: [KEY, 'find', q],
      queryFn: ({ signal }) => call(pumpEndpoints.list, { query: { q, sort: 'name', limit: FOUND_PUMPS }, signal }),
      enabled: q.trim() !== '',
    }),
  backtests: () =>
    queryOptions({ queryKey: ['backtests'], queryFn: ({ signal }) => call(backtestEndpoints.list, { signal }) }),
  /** Read again and again while the worker is at it. */
  backtest: (backtestId: string) =>
    queryOptions({
      queryKey: ['backtests', backtestId],
      queryFn: ({ signal }) => call(backtestEndpoints.read, { params: { backtestId }, signal }),
      enabled: backtestId !== '',
      refetchInterval: ({ state: { data } }) => (isUnderway(data?.state) ? FOLLOW_EVERY_MS : false),
    }),
};

/** Names a scope in an address: `company`, `model:…`, `pump:…`. */
export const scopeKey = (scope: RuleScope): string =>
  scope.kind === 'company' ? 'company' : scope.kind === 'model' ? `model:${scope.modelId}` : `pump:${scope.pumpId}`;

export const isSameScope = (layer: RuleLayer, key: string): boolean => scopeKey(layer.scope) === key;
