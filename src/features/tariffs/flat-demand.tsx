import { Select } from '#src/components/ui/select.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { addPeriod, removeMonthPrice, replacePeriod } from './edit-schedule.ts';
import { PeriodList } from './period-list.tsx';
import { monthName, periodName } from './period-words.ts';
import type { FlatDraft } from './tariff-draft.ts';
import type { Faults } from './tariff-faults.ts';

export type FlatDemandProps = {
  readonly flat: FlatDraft;
  readonly faults: Faults;
  readonly currency: string;
  readonly onChange: (flat: FlatDraft, key?: string) => void;
};

/** The price of a month's largest kW whatever the hour, and which one holds in which month. */
export function FlatDemand({ flat, faults, currency, onChange }: FlatDemandProps) {
  const { locale } = useFormat();
  const { periods, months } = flat;
  return (
    <div className="flex flex-col gap-4 px-4 pb-4 sm:px-5">
      <PeriodList
        {...{ periods, faults, currency }}
        place="flatDemand.periods"
        unit="kW"
        isNamed={false}
        onChange={(index, period, key) => onChange(replacePeriod(flat, index, period), key)}
        onAdd={() => onChange(addPeriod(flat))}
        onRemove={(index) => onChange(removeMonthPrice(flat, index))}
      />
      {periods.length === 1 && months.every((period) => period === 0) ? null : (
        <div className="flex flex-wrap gap-x-4 gap-y-2">
          {months.map((period, month) => (
            <span
              // biome-ignore lint/suspicious/noArrayIndexKey: a choice is its month.
              key={month}
              className="flex flex-col"
            >
              <Select
                label={t('tariff.flat.month', { month: monthName(month, locale, 'short') })}
                value={period === null ? '' : String(period)}
                options={[
                  ...(period === null ? [{ value: '', label: t('grid.hole') }] : []),
                  ...periods.map((_, index) => ({ value: String(index), label: periodName(periods, index) })),
                ]}
                onChange={(value) =>
                  onChange({ ...flat, months: months.map((before, at) => (at === month ? Number(value) : before)) })
                }
              />
              {faults.get(`flatDemand.months[${month}]`) === undefined ? null : (
                <span className="text-13 font-medium text-p1">{faults.get(`flatDemand.months[${month}]`)}</span>
              )}
            </span>
          ))}
        </div>
      )}
    </div>
  );
}
