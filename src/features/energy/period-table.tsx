import type { z } from 'zod';
import type { PeriodFigures } from '#shared/contract/http/energy-figures.ts';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { ExportButton } from '#src/components/ui/export-button.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { kwhText, shareText } from './energy-view.ts';

type Period = z.infer<typeof PeriodFigures>;

export type PeriodTableProps = {
  readonly periods: readonly Period[];
  readonly currency: string | null;
  readonly file: string;
};

/** What each tariff period took, in energy and money. */
export function PeriodTable({ periods, currency, file }: PeriodTableProps) {
  const format = useFormat();
  const all = periods.reduce((sum, { kwh }) => sum + kwh, 0);
  const rows = () => [
    [
      t('energy.column.period'),
      t('energy.column.kwh'),
      `${t('energy.column.cost')}${currency === null ? '' : `, ${currency}`}`,
    ],
    ...periods.map(({ name, kwh, cost }) => [name, kwh, cost]),
  ];
  return (
    <Sheet
      id="periods"
      title={t('energy.periods')}
      aside={periods.length === 0 ? null : <ExportButton name={file} rows={rows} />}
    >
      <div className="px-4 py-3 sm:px-5">
        {periods.length === 0 ? (
          <p className="text-ink-2">{t('energy.periods.none')}</p>
        ) : (
          <DataTable
            caption={t('energy.periods')}
            rows={periods}
            keyOf={(_, index) => index}
            columns={[
              { head: t('energy.column.period'), cell: ({ name }: Period) => name },
              { head: t('energy.column.kwh'), figures: true, right: true, cell: ({ kwh }) => kwhText(kwh, format) },
              {
                head: t('energy.column.share'),
                figures: true,
                right: true,
                cell: ({ kwh }) => (all > 0 && kwh > 0 ? shareText(kwh / all, format) : '–'),
              },
              {
                head: t('energy.column.cost'),
                figures: true,
                right: true,
                cell: ({ cost }) => format.money(cost, currency),
              },
            ]}
          />
        )}
      </div>
    </Sheet>
  );
}
