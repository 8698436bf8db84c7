import { useMemo } from 'react';
import type { FleetEnergy } from '#shared/contract/http/energy-fleet.ts';
import { BarFigure } from '#src/components/charts/bar-chart/bar-figure.tsx';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { ExportButton } from '#src/components/ui/export-button.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { kwhText } from './energy-view.ts';

type Day = FleetEnergy['days'][number];

const HEIGHT = 190;
const dayInstant = (day: string) => Date.parse(`${day}T00:00:00Z`);

/** kWh of all pumps day by day, each pad's own days. */
export function FleetDays({ days, month }: { readonly days: readonly Day[]; readonly month: string }) {
  const format = useFormat();
  const data = useMemo(
    () => ({
      labels: days.map(({ day }) => format.dayOfMonth(dayInstant(day), 'UTC')),
      parts: [{ label: t('energy.column.kwh'), values: days.map(({ kwh }) => kwh) }],
    }),
    [days, format],
  );
  const nameOf = ({ day }: Day) => format.day(dayInstant(day), 'UTC');
  return (
    <Sheet id="days">
      <div className="px-4 py-3 sm:px-5">
        <BarFigure
          title={t('energy.days')}
          data={data}
          height={HEIGHT}
          least={1}
          describe={(index) => {
            const day = days[index];
            return day === undefined ? '' : t('energy.barKwh', { label: nameOf(day), kwh: kwhText(day.kwh, format) });
          }}
          tableLabel={t('energy.days.table')}
          table={
            <div className="flex flex-col gap-2">
              <DataTable
                caption={t('energy.days.table')}
                rows={days.toReversed()}
                keyOf={({ day }) => day}
                columns={[
                  { head: t('energy.column.day'), figures: true, cell: nameOf },
                  { head: t('energy.column.kwh'), figures: true, right: true, cell: ({ kwh }) => kwhText(kwh, format) },
                  {
                    head: t('energy.column.pumps'),
                    figures: true,
                    right: true,
                    cell: ({ pumps }) => format.number(pumps),
                  },
                ]}
              />
              <ExportButton
                name={`energy-${month}-days`}
                rows={() => [
                  [t('energy.column.day'), t('energy.column.kwh'), t('energy.column.pumps')],
                  ...days.map(({ day, kwh, pumps }) => [day, kwh, pumps]),
                ]}
              />
            </div>
          }
        />
      </div>
    </Sheet>
  );
}
