import { useState } from 'react';
import { Button } from '#src/components/ui/button.tsx';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { Select } from '#src/components/ui/select.tsx';
import { TableToggle } from '#src/components/ui/table-toggle.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { type Days, fillArea } from './edit-schedule.ts';
import { listStretches } from './list-stretches.ts';
import { hoursText, monthName, monthsText, periodName } from './period-words.ts';
import { HOURS, MONTHS, type ScheduleDraft } from './tariff-draft.ts';

export type ScheduleWordsProps = {
  readonly schedule: ScheduleDraft;
  readonly onChange: (schedule: ScheduleDraft) => void;
};

const DAYS = ['weekday', 'weekend'] as const;
const numbers = (count: number, first = 0): string[] =>
  Array.from({ length: count }, (_, index) => String(index + first));

/** The same hours as words: a list of them, and a form that fills them. */
export function ScheduleWords({ schedule, onChange }: ScheduleWordsProps) {
  const format = useFormat();
  const rows = DAYS.flatMap((days) => listStretches(schedule[days]).map((stretch) => ({ days, ...stretch })));
  return (
    <TableToggle label={t('grid.list')}>
      <div className="flex flex-col gap-4">
        <FillForm schedule={schedule} onChange={onChange} />
        <DataTable
          caption={t('grid.list')}
          wide
          rows={rows}
          keyOf={({ days, fromMonth, from }) => `${days} ${fromMonth} ${from}`}
          columns={[
            { head: t('list.days'), cell: ({ days }) => t(`grid.title.${days}`) },
            {
              head: t('list.months'),
              cell: ({ fromMonth, toMonth }) => monthsText(fromMonth, toMonth, format.locale),
            },
            { head: t('list.hours'), figures: true, cell: ({ from, to }) => hoursText(from, to, format) },
            { head: t('list.period'), cell: ({ period }) => periodName(schedule.periods, period) },
          ]}
        />
      </div>
    </TableToggle>
  );
}

type Filling = {
  readonly days: Days | 'all';
  readonly fromMonth: string;
  readonly toMonth: string;
  readonly fromHour: string;
  readonly toHour: string;
  readonly period: string;
};

const FIRST: Filling = { days: 'weekday', fromMonth: '5', toMonth: '8', fromHour: '16', toHour: '21', period: '0' };

function FillForm({ schedule, onChange }: ScheduleWordsProps) {
  const { locale, minuteOfDay } = useFormat();
  const [filling, setFilling] = useState(FIRST);
  const set = (part: Partial<Filling>) => setFilling({ ...filling, ...part });
  const fill = () => {
    const { days, fromMonth, toMonth, fromHour, toHour, period } = filling;
    const area = {
      fromMonth: Math.min(Number(fromMonth), Number(toMonth)),
      toMonth: Math.max(Number(fromMonth), Number(toMonth)),
      fromHour: Math.min(Number(fromHour), Number(toHour) - 1),
      toHour: Math.max(Number(fromHour), Number(toHour) - 1),
    };
    const chosen: readonly Days[] = days === 'all' ? DAYS : [days];
    const place = Math.min(Number(period), schedule.periods.length - 1);
    onChange(chosen.reduce((filled: ScheduleDraft, each) => fillArea(filled, each, area, place), schedule));
  };
  const months = numbers(MONTHS).map((value) => ({ value, label: monthName(Number(value), locale) }));
  const hours = (first: number) =>
    numbers(HOURS, first).map((value) => ({ value, label: minuteOfDay(Number(value) * 60) }));
  return (
    <fieldset className="flex flex-wrap items-center gap-x-4 gap-y-2 border border-rule p-3">
      <legend className="px-1 font-medium">{t('list.fillTitle')}</legend>
      <Select
        label={t('list.days')}
        value={filling.days}
        options={[
          { value: 'all', label: t('list.everyDay') },
          ...DAYS.map((value) => ({ value, label: t(`grid.title.${value}`) })),
        ]}
        onChange={(days) => set({ days })}
      />
      <Select
        label={t('list.fromMonth')}
        value={filling.fromMonth}
        options={months}
        onChange={(fromMonth) => set({ fromMonth })}
      />
      <Select
        label={t('list.toMonth')}
        value={filling.toMonth}
        options={months}
        onChange={(toMonth) => set({ toMonth })}
      />
      <Select
        label={t('list.fromHour')}
        value={filling.fromHour}
        options={hours(0)}
        onChange={(fromHour) => set({ fromHour })}
      />
      <Select
        label={t('list.toHour')}
        value={filling.toHour}
        options={hours(1)}
        onChange={(toHour) => set({ toHour })}
      />
      <Select
        label={t('list.period')}
        value={String(Math.min(Number(filling.period), schedule.periods.length - 1))}
        options={schedule.periods.map((_, index) => ({
          value: String(index),
          label: periodName(schedule.periods, index),
        }))}
        onChange={(period) => set({ period })}
      />
      <Button onClick={fill}>{t('list.fill')}</Button>
    </fieldset>
  );
}
