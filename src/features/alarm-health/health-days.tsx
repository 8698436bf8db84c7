import { useMemo } from 'react';
import type { AlarmHealthFigures } from '#shared/contract/http/alarm-health.ts';
import { PRIORITIES } from '#shared/domain/detectors/detector.ts';
import { localTime } from '#shared/domain/time/local-time.ts';
import { BarFigure } from '#src/components/charts/bar-chart/bar-figure.tsx';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { ExportButton } from '#src/components/ui/export-button.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { formatDayParam } from '#src/lib/day-param.ts';
import { t } from '#src/lib/messages/health-words.ts';

type Day = AlarmHealthFigures['byDay'][number];

const HEIGHT = 170;
const LEAST = 4;

const sumOf = ({ urgent, soon, note }: Day) => urgent + soon + note;

/** Alarms day by day, with the table behind the bars. */
export function HealthDays({ byDay, zone }: { readonly byDay: readonly Day[]; readonly zone: string }) {
  const format = useFormat();
  const data = useMemo(
    () => ({
      labels: byDay.map(({ from }) => format.dayOfMonth(from, zone)),
      parts: PRIORITIES.map((priority) => ({
        label: t(`mark.${priority}`),
        values: byDay.map((day) => day[priority]),
      })),
    }),
    [byDay, zone, format],
  );
  const describe = (index: number) => {
    const day = byDay[index];
    return day === undefined ? '' : t('health.byDay.one', { ...day, day: format.day(day.from, zone) });
  };
  const rows = byDay.toReversed();
  const dateOf = (at: number) => formatDayParam(localTime(zone, at)?.epochDay ?? 0);
  const columns = PRIORITIES.map((priority) => ({
    head: t(`mark.${priority}`),
    figures: true,
    right: true,
    cell: (day: Day) => format.number(day[priority]),
  }));
  return (
    <Sheet id="days">
      <div className="px-4 py-3 sm:px-5">
        <BarFigure
          title={t('health.byDay', { zone: format.zoneName(byDay.at(-1)?.from ?? 0, zone) })}
          data={data}
          height={HEIGHT}
          least={LEAST}
          describe={describe}
          tableLabel={t('health.byDay.table')}
          table={
            <div className="flex flex-col gap-2">
              <DataTable
                caption={t('health.byDay.table')}
                rows={rows}
                keyOf={({ from }) => from}
                columns={[
                  { head: t('health.byDay.day'), figures: true, cell: ({ from }: Day) => format.day(from, zone) },
                  ...columns,
                  { head: t('health.byDay.all'), figures: true, right: true, cell: (day) => format.number(sumOf(day)) },
                ]}
              />
              <ExportButton
                name="alarms-by-day"
                rows={() => [
                  [t('health.byDay.day'), ...PRIORITIES.map((priority) => t(`mark.${priority}`))],
                  ...byDay.map((day) => [dateOf(day.from), ...PRIORITIES.map((priority) => day[priority])]),
                ]}
              />
            </div>
          }
        />
      </div>
    </Sheet>
  );
}
