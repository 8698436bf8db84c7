import { Button } from '#src/components/ui/button.tsx';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { periodLook } from './period-look.ts';
import { periodName } from './period-words.ts';
import { NEW_TIER, type PeriodDraft, type TierDraft } from './tariff-draft.ts';
import type { Faults } from './tariff-faults.ts';
import { TierRow } from './tier-row.tsx';

export type PeriodListProps = {
  readonly periods: readonly PeriodDraft[];
  /** Where faults of these periods are said: `energy.periods`. */
  readonly place: string;
  readonly faults: Faults;
  readonly unit: string;
  readonly currency: string;
  readonly isNamed: boolean;
  /** `key` names a field in which one types on. */
  readonly onChange: (index: number, period: PeriodDraft, key?: string) => void;
  readonly onAdd: () => void;
  readonly onRemove: (index: number) => void;
};

/** The prices of a schedule: each a texture, a numeral, a name, its tiers. */
export function PeriodList({ periods, place, faults, unit, currency, isNamed, ...acts }: PeriodListProps) {
  return (
    <div className="flex flex-col gap-3">
      <ol className="flex flex-col gap-3">
        {periods.map((period, index) => {
          const name = periodName(periods, index);
          const at = `${place}[${index}]`;
          return (
            <li key={period.id} className="flex flex-wrap items-start gap-x-4 gap-y-2 border-t border-rule pt-3">
              <span className="flex min-h-8 items-center gap-2">
                <Swatch period={index} />
                {isNamed ? (
                  <input
                    aria-label={t('period.nameNamed', { number: String(index + 1) })}
                    value={period.name}
                    maxLength={40}
                    placeholder={t('period.usual', { number: String(index + 1) })}
                    onChange={(event) => acts.onChange(index, { ...period, name: event.target.value }, `${at} name`)}
                    className="min-h-8 w-40 rounded-control border border-ink-2 bg-sheet px-2 placeholder:text-ink-2"
                  />
                ) : (
                  <span className="w-24">{name}</span>
                )}
              </span>
              <div className="flex min-w-0 flex-col gap-2">
                <ol className="flex flex-col gap-2">
                  {period.tiers.map((tier, step) => (
                    <TierRow
                      // biome-ignore lint/suspicious/noArrayIndexKey: a tier is its place among the tiers.
                      key={step}
                      tier={tier}
                      number={step + 1}
                      isLast={step === period.tiers.length - 1}
                      isOnly={period.tiers.length === 1}
                      unit={unit}
                      currency={currency}
                      period={name}
                      fault={(part) => faults.get(`${at}[${step}].${part}`)}
                      onChange={(changed) => acts.onChange(index, replaceTier(period, step, changed), `${at} ${step}`)}
                      onRemove={() => acts.onChange(index, removeTier(period, step))}
                    />
                  ))}
                </ol>
                {faults.get(at) === undefined ? null : <p className="text-13 font-medium text-p1">{faults.get(at)}</p>}
                <span className="flex flex-wrap gap-2">
                  <Button
                    look="quiet"
                    aria-label={t('tier.addNamed', { period: name })}
                    onClick={() => acts.onChange(index, { ...period, tiers: [...period.tiers, NEW_TIER] })}
                  >
                    {t('tier.add')}
                  </Button>
                  {periods.length === 1 ? null : (
                    <Button
                      look="quiet"
                      aria-label={t('period.removeNamed', { name })}
                      onClick={() => acts.onRemove(index)}
                    >
                      {t('period.remove')}
                    </Button>
                  )}
                </span>
              </div>
            </li>
          );
        })}
      </ol>
      <div>
        <Button disabled={periods.length >= 24} onClick={acts.onAdd}>
          {t('period.add')}
        </Button>
      </div>
    </div>
  );
}

/** A period's texture with its numeral. */
export const Swatch = ({ period }: { readonly period: number }) => (
  <span
    aria-hidden="true"
    style={periodLook(period)}
    className="figures inline-flex size-6 items-center justify-center border border-rule-strong text-13"
  >
    <span className="bg-sheet px-0.5 leading-none">{period + 1}</span>
  </span>
);

const replaceTier = (period: PeriodDraft, place: number, tier: TierDraft): PeriodDraft => ({
  ...period,
  tiers: period.tiers.map((before, index) => (index === place ? tier : before)),
});

/** The last tier has no bound, whichever is the last then. */
const removeTier = (period: PeriodDraft, place: number): PeriodDraft => {
  const left = period.tiers.filter((_, index) => index !== place);
  return {
    ...period,
    tiers: left.map((tier, index) => (index === left.length - 1 ? { ...tier, upTo: '', perDay: false } : tier)),
  };
};
