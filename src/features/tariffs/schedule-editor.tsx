import { useId, useState } from 'react';
import { Button } from '#src/components/ui/button.tsx';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { addPeriod, type Days, fillArea, removePeriod, replacePeriod } from './edit-schedule.ts';
import { PeriodList, Swatch } from './period-list.tsx';
import { periodName } from './period-words.ts';
import { ScheduleGrid } from './schedule-grid.tsx';
import { ScheduleWords } from './schedule-words.tsx';
import type { ScheduleDraft } from './tariff-draft.ts';
import type { Faults } from './tariff-faults.ts';

export type ScheduleEditorProps = {
  readonly title: string;
  readonly schedule: ScheduleDraft;
  readonly place: 'energy' | 'demand';
  readonly faults: Faults;
  readonly currency: string;
  /** `key` names a field in which one types on. */
  readonly onChange: (schedule: ScheduleDraft, key?: string) => void;
};

const DAYS: readonly Days[] = ['weekday', 'weekend'];

/** Prices by period, and which period rules each hour of the year. */
export function ScheduleEditor({ title, schedule, place, faults, currency, onChange }: ScheduleEditorProps) {
  const [chosen, setBrush] = useState(0);
  const brush = Math.min(chosen, schedule.periods.length - 1);
  return (
    <div className="flex flex-col gap-5 px-4 py-4 sm:px-5">
      <PeriodList
        periods={schedule.periods}
        place={`${place}.periods`}
        faults={faults}
        unit={place === 'energy' ? 'kWh' : 'kW'}
        currency={currency}
        isNamed={place === 'energy'}
        onChange={(index, period, key) => onChange(replacePeriod(schedule, index, period), key)}
        onAdd={() => {
          onChange(addPeriod(schedule));
          setBrush(schedule.periods.length);
        }}
        onRemove={(index) => onChange(removePeriod(schedule, index))}
      />
      <div className="flex flex-col gap-2">
        <Brush periods={schedule.periods} value={brush} onChange={setBrush} />
        <p className="max-w-prose text-13 text-ink-2">{t('grid.hint')}</p>
      </div>
      <div className="grid gap-x-8 gap-y-4 xl:grid-cols-2">
        {DAYS.map((days) => (
          <div key={days} className="flex flex-col gap-1">
            <div className="flex min-h-8 flex-wrap items-center justify-between gap-2">
              <h3 className="font-medium">{t(`grid.title.${days}`)}</h3>
              {days === 'weekday' ? null : (
                <Button onClick={() => onChange({ ...schedule, weekend: schedule.weekday })}>
                  {t('grid.copyWeekday')}
                </Button>
              )}
            </div>
            <ScheduleGrid
              name={t('grid.name', { schedule: title, days: t(`grid.title.${days}`) })}
              matrix={schedule[days]}
              periods={schedule.periods}
              brush={brush}
              onFill={(area, period) => onChange(fillArea(schedule, days, area, period))}
            />
            {faults.get(`${place}.${days}`) === undefined ? null : (
              <p className="text-13 font-medium text-p1">{faults.get(`${place}.${days}`)}</p>
            )}
          </div>
        ))}
      </div>
      <ScheduleWords schedule={schedule} onChange={onChange} />
    </div>
  );
}

type BrushProps = {
  readonly periods: ScheduleDraft['periods'];
  readonly value: number;
  readonly onChange: (period: number) => void;
};

function Brush({ periods, value, onChange }: BrushProps) {
  const name = useId();
  return (
    <fieldset className="flex flex-wrap items-center gap-x-4 gap-y-1">
      <legend className="float-left mr-4 font-medium">{t('grid.brush')}</legend>
      {periods.map(({ id }, index) => (
        <label key={id} className="flex min-h-8 items-center gap-2">
          <input
            type="radio"
            name={name}
            className="size-5 accent-ink"
            checked={index === value}
            onChange={() => onChange(index)}
          />
          <Swatch period={index} />
          {periodName(periods, index)}
        </label>
      ))}
    </fieldset>
  );
}
