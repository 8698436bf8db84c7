import type { z } from 'zod';
import type { EnergySpan } from '#shared/contract/http/energy.ts';
import type { EnergyFigures, PeriodFigures } from '#shared/contract/http/energy-figures.ts';
import { type Column, DataTable } from '#src/components/ui/data-table.tsx';
import { ExportButton } from '#src/components/ui/export-button.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { coverageOf, isLeast, kwhText, shareText, sigmaText, volumeText } from './energy-view.ts';
import { nameOfMonth } from './local-month.ts';

type Period = z.infer<typeof PeriodFigures>;

/** What both a pump's and a pad's answer say of their spans. */
export type SpanAnswer = {
  readonly by: 'day' | 'month';
  readonly currency: string | null;
  readonly zone: string;
  readonly periods: readonly Period[];
  readonly spans: readonly EnergySpan[];
};

/** "Tue, Dec 1" or "Dec 2026". */
export const labelOfSpan = ({ from, label }: EnergySpan, { by, zone }: SpanAnswer, format: Format): string =>
  by === 'day' ? format.day(from, zone) : nameOfMonth(label, format.locale, 'short');

const waterText = ({ water }: EnergyFigures, format: Format): string => {
  if (water === null || (water.gallons === 0 && water.unknownSeconds > 0)) return '–';
  const sigma = water.sigmaGallons === null ? '' : ` ± ${sigmaText(water.sigmaGallons, format)}`;
  return `${isLeast(water) ? '≥ ' : ''}${volumeText(water.gallons, format)}${sigma}`;
};

function listColumns(answer: SpanAnswer, format: Format): Column<EnergySpan>[] {
  const right = { figures: true, right: true };
  return [
    {
      head: answer.by === 'day' ? t('energy.column.day') : t('energy.column.month'),
      figures: true,
      cell: (span) => labelOfSpan(span, answer, format),
    },
    { head: t('energy.column.kwh'), ...right, cell: ({ kwh }) => kwhText(kwh, format) },
    ...answer.periods.map(({ name }, index) => ({
      head: name,
      ...right,
      cell: ({ kwhByPeriod }: EnergySpan) => kwhText(kwhByPeriod[index] ?? 0, format),
    })),
    { head: t('energy.column.cost'), ...right, cell: ({ cost }) => format.money(cost, answer.currency) },
    { head: t('energy.column.water'), ...right, cell: (span) => waterText(span, format) },
    {
      head: t('energy.column.turnovers'),
      ...right,
      cell: ({ turnovers, water }) =>
        turnovers === null ? '–' : `${isLeast(water) ? '≥ ' : ''}${format.number(turnovers, 2)}`,
    },
    { head: t('energy.column.running'), ...right, cell: ({ onSeconds }) => format.span(onSeconds * 1000) },
    {
      head: t('energy.column.coverage'),
      ...right,
      cell: (span) => {
        const coverage = coverageOf(span);
        return coverage === undefined ? '–' : shareText(coverage, format);
      },
    },
  ];
}

const exportRows = ({ periods, spans, currency, by }: SpanAnswer) => [
  [
    by === 'day' ? t('energy.column.day') : t('energy.column.month'),
    t('energy.column.kwh'),
    ...periods.map(({ name }) => `${name}, kWh`),
    `${t('energy.column.cost')}${currency === null ? '' : `, ${currency}`}`,
    `${t('energy.column.water')}, gal`,
    t('energy.column.sigma'),
    t('energy.column.unknown'),
    t('energy.column.turnovers'),
    `${t('energy.column.running')}, h`,
    `${t('energy.column.coverage')}, %`,
  ],
  ...spans.map((span) => [
    span.label,
    span.kwh,
    ...periods.map((_, index) => span.kwhByPeriod[index] ?? 0),
    span.cost,
    span.water?.gallons ?? null,
    span.water?.sigmaGallons ?? null,
    span.water === null ? null : span.water.unknownSeconds / 3600,
    span.turnovers,
    span.onSeconds / 3600,
    (coverageOf(span) ?? Number.NaN) * 100,
  ]),
];

/** Everything the bars show, and what they do not, one span a row, the latest first. */
export function SpanTable({ answer, file }: { readonly answer: SpanAnswer; readonly file: string }) {
  const format = useFormat();
  const caption = answer.by === 'day' ? t('energy.days.table') : t('energy.months.table');
  return (
    <div className="flex flex-col gap-2">
      <DataTable
        wide="very"
        caption={caption}
        rows={answer.spans.toReversed()}
        keyOf={({ label }) => label}
        columns={listColumns(answer, format)}
      />
      <ExportButton name={file} rows={() => exportRows(answer)} />
    </div>
  );
}
