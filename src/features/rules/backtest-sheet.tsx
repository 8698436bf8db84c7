import { useState } from 'react';
import type { BacktestResult as Result } from '#shared/contract/http/backtests.ts';
import type { RuleScope, StoredRules } from '#shared/contract/http/rules.ts';
import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Select } from '#src/components/ui/select.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { isApiError } from '#src/lib/api/api-error.ts';
import { t } from '#src/lib/messages/rules-words.ts';
import { BacktestResult } from './backtest-result.tsx';
import { useBacktest } from './use-backtest.ts';

export type BacktestSheetProps = {
  readonly scope: RuleScope;
  /** What would be set; undefined while something typed cannot be. */
  readonly rules: StoredRules | undefined;
  readonly hasChanges: boolean;
};

const DAYS = ['3', '7', '14', '30'] as const;

/** Tries the changes on what is stored: asks, follows, calls off, shows what would differ. */
export function BacktestSheet({ scope, rules, hasChanges }: BacktestSheetProps) {
  const [days, setDays] = useState<(typeof DAYS)[number]>('7');
  const { shown, ask, cancel, isOwn } = useBacktest();
  const result = shown.data;
  const isUnderway = result?.state === 'waiting' || result?.state === 'running';
  return (
    <Sheet id="try" title={t('try.title')}>
      <div className="flex flex-col gap-3 px-4 py-3 sm:px-5">
        <p className="max-w-prose text-ink-2">{t('try.lead')}</p>
        <div className="flex flex-wrap items-center gap-3">
          <Select
            label={t('try.days')}
            value={days}
            onChange={setDays}
            options={DAYS.map((value) => ({ value, label: t('try.days.option', { count: Number(value) }) }))}
          />
          <Button
            disabled={rules === undefined || !hasChanges || isUnderway || ask.isPending}
            onClick={() => rules !== undefined && ask.mutate({ scope, rules, days: Number(days) })}
          >
            {t('try.start')}
          </Button>
          {isUnderway && result !== undefined ? (
            <Button disabled={result.cancelAsked} onClick={() => cancel.mutate(result.id)}>
              {t('try.cancel')}
            </Button>
          ) : null}
        </div>
        {ask.isError ? (
          isApiError(ask.error, 'conflict') ? (
            <p role="alert">{t('try.busy')}</p>
          ) : (
            <ErrorNotice error={ask.error} />
          )
        ) : null}
        {shown.isError ? <ErrorNotice error={shown.error} onRetry={() => void shown.refetch()} /> : null}
        {result === undefined ? null : <Shown result={result} isOwn={isOwn} />}
      </div>
    </Sheet>
  );
}

function Shown({ result, isOwn }: { readonly result: Result; readonly isOwn: boolean }) {
  const format = useFormat();
  const { company } = useSession();
  const { state, pumps, pumpsDone, readings, progress, failure, askedBy, askedAt } = result;
  const isUnderway = state === 'waiting' || state === 'running';
  return (
    <div className="flex flex-col gap-3" aria-busy={isUnderway}>
      {isOwn ? null : (
        <p className="text-ink-2">
          {t('try.other', { name: askedBy ?? '–', time: format.moment(askedAt, company.zone, result.to) })}
        </p>
      )}
      {isUnderway ? (
        <div>
          <progress
            aria-label={t('try.progress')}
            value={progress}
            max={1}
            className="h-3 w-full max-w-md accent-ink"
          />
          <p role="status" className="figures text-13 text-ink-2">
            {state === 'waiting' ? t('try.waiting') : t('try.running', { done: pumpsDone, pumps, readings })}
          </p>
        </div>
      ) : null}
      {state === 'cancelled' ? <p role="status">{t('try.cancelled')}</p> : null}
      {state === 'failed' ? <p role="alert">{t('try.failed', { reason: failure ?? '–' })}</p> : null}
      {state === 'done' || pumpsDone > 0 ? <BacktestResult result={result} /> : null}
    </div>
  );
}
