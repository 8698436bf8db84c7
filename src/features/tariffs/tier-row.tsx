import { useId } from 'react';
import { Button } from '#src/components/ui/button.tsx';
import { t } from '#src/lib/messages/tariffs-words.ts';
import type { TierDraft } from './tariff-draft.ts';

export type TierRowProps = {
  readonly tier: TierDraft;
  readonly number: number;
  readonly isLast: boolean;
  readonly isOnly: boolean;
  /** kWh or kW. */
  readonly unit: string;
  readonly currency: string;
  readonly period: string;
  readonly fault: (part: 'rateMicros' | 'adjustmentMicros' | 'upTo') => string | undefined;
  readonly onChange: (tier: TierDraft) => void;
  readonly onRemove: () => void;
};

const INPUT = 'figures min-h-8 rounded-control border border-ink-2 bg-sheet px-2 text-15 aria-invalid:border-p1';

/** One tier on a line: its price, and up to where it holds. */
export function TierRow(props: TierRowProps) {
  const { tier, number, isLast, isOnly, unit, currency, period, fault, onChange, onRemove } = props;
  const id = useId();
  const rate = fault('rateMicros') ?? fault('adjustmentMicros');
  const bound = fault('upTo');
  const named = { unit, period, number: String(number) };
  return (
    <li className="flex flex-col gap-1">
      <span className="flex flex-wrap items-center gap-2">
        <input
          aria-label={t('tier.rateNamed', named)}
          aria-invalid={rate === undefined ? undefined : true}
          aria-describedby={rate === undefined ? undefined : `${id}-rate`}
          inputMode="decimal"
          value={tier.rate}
          onChange={(event) => onChange({ ...tier, rate: event.target.value })}
          className={`${INPUT} w-28`}
        />
        <span className="text-ink-2">
          {currency} / {unit}
        </span>
        {tier.adjustment === '0' || tier.adjustment === '' ? null : (
          <span className="text-ink-2">{t('tier.adjustment', { amount: tier.adjustment })}</span>
        )}
        {isLast ? (
          <span className="text-ink-2">{t(isOnly ? 'tier.all' : 'tier.above')}</span>
        ) : (
          <>
            <span className="text-ink-2">{t('tier.upTo').toLowerCase()}</span>
            <input
              aria-label={t('tier.upToNamed', named)}
              aria-invalid={bound === undefined ? undefined : true}
              aria-describedby={bound === undefined ? undefined : `${id}-bound`}
              inputMode="decimal"
              value={tier.upTo}
              onChange={(event) => onChange({ ...tier, upTo: event.target.value })}
              className={`${INPUT} w-24`}
            />
            <span className="text-ink-2">{unit}</span>
            <select
              aria-label={t('tier.perNamed', named)}
              value={tier.perDay ? 'day' : 'month'}
              onChange={(event) => onChange({ ...tier, perDay: event.target.value === 'day' })}
              className="min-h-8 rounded-control border border-ink-2 bg-sheet px-2"
            >
              <option value="month">{t('tier.month')}</option>
              <option value="day">{t('tier.day')}</option>
            </select>
          </>
        )}
        {isOnly ? null : (
          <Button
            look="quiet"
            aria-label={t('tier.removeNamed', { number: String(number), period })}
            onClick={onRemove}
          >
            {t('tier.remove')}
          </Button>
        )}
      </span>
      <Fault id={`${id}-rate`} text={rate} />
      <Fault id={`${id}-bound`} text={bound} />
    </li>
  );
}

const Fault = ({ id, text }: { readonly id: string; readonly text: string | undefined }) =>
  text === undefined ? null : (
    <p id={id} className="text-13 font-medium text-p1">
      {text}
    </p>
  );
