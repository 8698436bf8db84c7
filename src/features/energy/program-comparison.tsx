import type { ReactNode } from 'react';
import type { ProgramFigures } from '#shared/contract/http/energy-programs.ts';
import { DAY_MS } from '#shared/domain/time/local-time.ts';
import { describeSource } from '#src/components/charts/strip/strip-words.ts';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { TableToggle } from '#src/components/ui/table-toggle.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { describeDays } from '#src/lib/describe-days.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { kwhText, volumeText } from './energy-view.ts';
import { shortNeeds } from './program-view.ts';
import { isEveryDay, WeekStrip } from './week-strip.tsx';

export type ProgramComparisonProps = {
  readonly name: string;
  readonly before: ProgramFigures;
  readonly after: ProgramFigures | null;
  readonly currency: string | null;
};

/** The entries of a program, one a line. */
function Entries({ program }: Pick<ProgramFigures, 'program'>) {
  const format = useFormat();
  if (program.length === 0) return t('program.noEntry');
  return (
    <ul>
      {program.map(({ days, fromMinute, toMinute, rpm }) => (
        <li key={`${fromMinute} ${days.join()}`}>
          {t('program.entry', {
            days: describeDays(days, format.locale),
            from: format.minuteOfDay(fromMinute),
            to: format.minuteOfDay(toMinute),
            rpm: format.rpm(rpm),
          })}
        </li>
      ))}
    </ul>
  );
}

type Line = { readonly name: string; readonly of: (figures: ProgramFigures) => ReactNode };

const listLines = (currency: string | null, format: Format): Line[] => [
  { name: t('program.entries'), of: ({ program }) => <Entries program={program} /> },
  { name: t('program.kwh'), of: ({ kwhPerMonth }) => kwhText(kwhPerMonth, format) },
  { name: t('program.cost'), of: ({ costPerMonth }) => format.money(costPerMonth, currency) },
  { name: t('program.water'), of: ({ gallonsPerDay }) => volumeText(gallonsPerDay, format) },
  { name: t('program.shortfalls'), of: (figures) => shortNeeds(figures) || t('program.short.none') },
];

/** A program before and after: two strips on one axis, and the figures of both. */
export function ProgramComparison({ name, before, after, currency }: ProgramComparisonProps) {
  const format = useFormat();
  const asDay = isEveryDay(before.week) && (after === null || isEveryDay(after.week));
  const sides = [
    { which: t('program.before'), figures: before },
    ...(after === null ? [] : [{ which: t('program.after'), figures: after }]),
  ];
  const stripName = (which: string) =>
    asDay ? t('program.stripDay', { which, name }) : t('program.strip', { which, name });
  return (
    <div className="flex flex-col gap-2">
      {sides.map(({ which, figures }) => (
        <div key={which} className="grid gap-x-4 sm:grid-cols-[4.5rem_minmax(0,1fr)]">
          <span className="text-ink-2 sm:pt-5">{which}</span>
          <WeekStrip week={figures.week} asDay={asDay} name={stripName(which)} />
        </div>
      ))}
      <DataTable
        caption={t('program.figures')}
        rows={listLines(currency, format)}
        keyOf={({ name: line }) => line}
        columns={[
          { head: t('program.column.figure'), cell: (line: Line) => line.name },
          ...sides.map(({ which, figures }) => ({ head: which, cell: ({ of }: Line) => of(figures) })),
        ]}
      />
      <TableToggle label={t('program.table')}>
        {sides.map(({ which, figures }) => (
          <WeekTable key={which} week={figures.week} asDay={asDay} caption={stripName(which)} />
        ))}
      </TableToggle>
    </div>
  );
}

type WeekTableProps = {
  readonly week: ProgramFigures['week'];
  readonly asDay: boolean;
  readonly caption: string;
};

/** A Monday, for the names of days. */
const MONDAY = Date.UTC(2024, 0, 1);

function WeekTable({ week, asDay, caption }: WeekTableProps) {
  const format = useFormat();
  const weekday = new Intl.DateTimeFormat(format.locale, { weekday: 'short', timeZone: 'UTC' });
  const moment = (at: number) => {
    const time = format.minuteOfDay((at % DAY_MS) / 60_000);
    return asDay ? time : `${weekday.format(MONDAY + at)} ${time}`;
  };
  const rows = week.filter(({ from, rpm }) => rpm > 0 && (!asDay || from < DAY_MS));
  return (
    <div className="py-2">
      <h4 className="text-13 text-ink-2">{caption}</h4>
      <DataTable
        caption={caption}
        rows={rows}
        keyOf={({ from }) => from}
        columns={[
          {
            head: t('program.column.from'),
            figures: true,
            cell: ({ from }: ProgramFigures['week'][number]) => moment(from),
          },
          { head: t('program.column.to'), figures: true, cell: ({ to }) => moment(to) },
          { head: t('program.column.source'), cell: describeSource },
          { head: t('program.column.speed'), figures: true, right: true, cell: ({ rpm }) => format.rpm(rpm) },
        ]}
      />
    </div>
  );
}
