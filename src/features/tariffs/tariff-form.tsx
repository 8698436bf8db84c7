import { Field } from '#src/components/ui/field.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { FlatDemand } from './flat-demand.tsx';
import { monthName } from './period-words.ts';
import { ScheduleEditor } from './schedule-editor.tsx';
import { MONTHS, newFlat, newSchedule, type TariffDraft } from './tariff-draft.ts';
import type { Faults } from './tariff-faults.ts';

export type TariffFormProps = {
  readonly draft: TariffDraft;
  readonly faults: Faults;
  readonly readOnly: boolean;
  /** `key` names a field in which one types on. */
  readonly onChange: (draft: TariffDraft, key?: string) => void;
};

/** Everything a tariff says, on sheets: the bill, energy by hour, demand. */
export function TariffForm({ draft, faults, readOnly, onChange }: TariffFormProps) {
  const { currency, energy, demand, flatDemand } = draft;
  const set = (part: Partial<TariffDraft>, key?: string) => onChange({ ...draft, ...part }, key);
  return (
    <fieldset disabled={readOnly} className="flex min-w-0 flex-col gap-4">
      <Sheet id="bill" title={t('tariff.basics')}>
        <div className="grid gap-4 px-4 py-4 sm:grid-cols-3 sm:px-5">
          <Field
            label={t('tariff.name')}
            hint={t('tariff.name.hint')}
            value={draft.name}
            maxLength={120}
            error={faults.get('name')}
            onChange={(event) => set({ name: event.target.value }, 'name')}
          />
          <Field
            label={t('tariff.currency')}
            hint={t('tariff.currency.hint')}
            value={currency}
            maxLength={3}
            autoCapitalize="characters"
            error={faults.get('currency')}
            onChange={(event) => set({ currency: event.target.value.toUpperCase() }, 'currency')}
          />
          <Field
            label={t('tariff.fixed')}
            hint={t('tariff.fixed.hint')}
            inputMode="decimal"
            value={draft.fixedPerMonth}
            error={faults.get('fixedMicrosPerMonth')}
            onChange={(event) => set({ fixedPerMonth: event.target.value }, 'fixed')}
          />
          <Monthly draft={draft} faults={faults} readOnly={readOnly} onChange={onChange} />
        </div>
      </Sheet>
      <Sheet id="energy" title={t('tariff.energy')}>
        <ScheduleEditor
          title={t('tariff.energy')}
          place="energy"
          {...{ schedule: energy, faults, currency }}
          onChange={(schedule, key) => set({ energy: schedule }, key)}
        />
      </Sheet>
      <Sheet id="demand" title={t('tariff.demand')}>
        <Switch
          label={t('tariff.demand.on')}
          on={demand !== null}
          onChange={(on) => set({ demand: on ? newSchedule() : null })}
        />
        {demand === null ? null : (
          <ScheduleEditor
            title={t('tariff.demand')}
            place="demand"
            {...{ schedule: demand, faults, currency }}
            onChange={(schedule, key) => set({ demand: schedule }, key)}
          />
        )}
        <Switch
          label={t('tariff.flat.on')}
          on={flatDemand !== null}
          onChange={(on) => set({ flatDemand: on ? newFlat() : null })}
        />
        {flatDemand === null ? null : (
          <FlatDemand
            {...{ flat: flatDemand, faults, currency }}
            onChange={(flat, key) => set({ flatDemand: flat }, key)}
          />
        )}
      </Sheet>
    </fieldset>
  );
}

function Monthly({ draft, faults, onChange }: TariffFormProps) {
  const { locale } = useFormat();
  const months = draft.monthlyAdjustment;
  return (
    <div className="flex flex-col gap-3 sm:col-span-3">
      <Switch
        label={t('tariff.monthly.on')}
        on={months !== null}
        onChange={(on) =>
          onChange({ ...draft, monthlyAdjustment: on ? Array.from({ length: MONTHS }, () => '0') : null })
        }
        flush
      />
      {months === null ? null : (
        <fieldset className="grid grid-cols-2 gap-3 sm:grid-cols-4 lg:grid-cols-6">
          <legend className="pb-2 font-medium">{t('tariff.monthly')}</legend>
          {months.map((text, month) => (
            <Field
              // biome-ignore lint/suspicious/noArrayIndexKey: a field is its month.
              key={month}
              label={monthName(month, locale)}
              inputMode="decimal"
              value={text}
              error={faults.get(`monthlyAdjustmentMicros[${month}]`)}
              onChange={(event) =>
                onChange(
                  {
                    ...draft,
                    monthlyAdjustment: months.map((before, at) => (at === month ? event.target.value : before)),
                  },
                  `monthly ${month}`,
                )
              }
            />
          ))}
        </fieldset>
      )}
    </div>
  );
}

type SwitchProps = {
  readonly label: string;
  readonly on: boolean;
  readonly onChange: (on: boolean) => void;
  readonly flush?: boolean;
};

const Switch = ({ label, on, onChange, flush = false }: SwitchProps) => (
  <label className={`flex min-h-11 items-center gap-3 ${flush ? '' : 'px-4 sm:px-5'}`}>
    <input type="checkbox" className="size-5 shrink-0 accent-ink" checked={on} onChange={() => onChange(!on)} />
    {label}
  </label>
);
