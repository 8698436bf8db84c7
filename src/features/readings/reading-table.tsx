import type { ReadingSeries } from '#shared/contract/http/pumps.ts';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { type ReadingRow, tableRows } from './reading-view.ts';

/** The charts' numbers, a quarter of an hour a row. */
export function ReadingTable({ series, zone }: { readonly series: ReadingSeries; readonly zone: string }) {
  const format = useFormat();
  const figure = (value: number | null) => (value === null ? '–' : format.number(value));
  return (
    <DataTable
      caption={t('pump.chart.tableOf')}
      rows={tableRows(series)}
      keyOf={({ at }) => at}
      columns={[
        { head: t('pump.chart.time'), figures: true, cell: ({ at }: ReadingRow) => format.time(at, zone) },
        { head: t('strip.measured'), figures: true, right: true, cell: ({ rpm }) => figure(rpm) },
        { head: t('strip.expected'), figures: true, right: true, cell: ({ expectedRpm }) => figure(expectedRpm) },
        { head: t('strip.watts'), figures: true, right: true, cell: ({ watts }) => figure(watts) },
        {
          head: t('pump.chart.lowHigh'),
          figures: true,
          right: true,
          cell: ({ wattsLow, wattsHigh }) => (wattsLow === null ? '–' : `${figure(wattsLow)}–${figure(wattsHigh)}`),
        },
      ]}
    />
  );
}
