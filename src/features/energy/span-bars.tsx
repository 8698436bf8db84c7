import { useMemo } from 'react';
import type { EnergySpan } from '#shared/contract/http/energy.ts';
import { BarFigure } from '#src/components/charts/bar-chart/bar-figure.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { kwhText } from './energy-view.ts';
import { nameOfMonth } from './local-month.ts';
import { labelOfSpan, type SpanAnswer, SpanTable } from './span-table.tsx';

const HEIGHT = 190;
const LEAST_KWH = 1;

const shortLabel = ({ from, label }: EnergySpan, { by, zone }: SpanAnswer, format: Format) =>
  by === 'day' ? format.dayOfMonth(from, zone) : nameOfMonth(label, format.locale, 'short');

function describeSpan(span: EnergySpan | undefined, answer: SpanAnswer, format: Format): string {
  if (span === undefined) return '';
  const label = labelOfSpan(span, answer, format);
  const parts = answer.periods.map(({ name }, index) =>
    t('energy.barPart', { name, kwh: kwhText(span.kwhByPeriod[index] ?? 0, format) }),
  );
  const line =
    span.cost === null
      ? t('energy.barKwh', { label, kwh: kwhText(span.kwh, format) })
      : t('energy.bar', { label, kwh: kwhText(span.kwh, format), cost: format.money(span.cost, answer.currency) });
  return parts.length < 2 ? line : `${line} (${parts.join(', ')})`;
}

/** kWh of each day or month, in parts by tariff period, with the table behind it. */
export function SpanBars({ answer, file }: { readonly answer: SpanAnswer; readonly file: string }) {
  const format = useFormat();
  const data = useMemo(() => {
    const { periods, spans } = answer;
    const parts =
      periods.length === 0
        ? [{ label: t('energy.column.kwh'), values: spans.map(({ kwh }) => kwh) }]
        : periods.map(({ name }, index) => ({
            label: name,
            values: spans.map(({ kwhByPeriod }) => kwhByPeriod[index] ?? 0),
          }));
    return { labels: spans.map((span) => shortLabel(span, answer, format)), parts };
  }, [answer, format]);
  const byDay = answer.by === 'day';
  return (
    <BarFigure
      title={byDay ? t('energy.days') : t('energy.months')}
      data={data}
      height={HEIGHT}
      least={LEAST_KWH}
      describe={(index) => describeSpan(answer.spans[index], answer, format)}
      tableLabel={byDay ? t('energy.days.table') : t('energy.months.table')}
      table={<SpanTable answer={answer} file={file} />}
    />
  );
}
