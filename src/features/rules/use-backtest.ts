import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { type Backtest, backtestEndpoints } from '#shared/contract/http/backtests.ts';
import type { RuleScope, StoredRules } from '#shared/contract/http/rules.ts';
import { call } from '#src/lib/api/api-client.ts';
import { serverNow } from '#src/lib/server-clock.ts';
import { ruleQueries } from './rule-queries.ts';

const DAY_MS = 86_400_000;

const isUnderway = ({ state }: Backtest): boolean => state === 'waiting' || state === 'running';

/** The backtest that is looked at: the one asked for here, else one that is underway. */
export function useBacktest() {
  const client = useQueryClient();
  const [askedId, setAskedId] = useState('');
  const { data: latest } = useQuery(ruleQueries.backtests());
  const underway = latest?.items.find(isUnderway);
  const shownId = askedId === '' ? (underway?.id ?? '') : askedId;
  const shown = useQuery(ruleQueries.backtest(shownId));
  const again = () => client.invalidateQueries({ queryKey: ['backtests'] });
  const ask = useMutation({
    mutationFn: ({
      scope,
      rules,
      days,
    }: {
      readonly scope: RuleScope;
      readonly rules: StoredRules;
      readonly days: number;
    }) => {
      const to = serverNow();
      return call(backtestEndpoints.ask, { body: { scope, rules, from: to - days * DAY_MS, to } });
    },
    onSuccess: ({ id }) => setAskedId(id),
    onSettled: again,
  });
  const cancel = useMutation({
    mutationFn: (backtestId: string) => call(backtestEndpoints.cancel, { params: { backtestId } }),
    onSettled: again,
  });
  return { shown, ask, cancel, isOwn: askedId !== '' };
}
