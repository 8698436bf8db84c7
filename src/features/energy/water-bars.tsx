import { useMemo } from 'react';
import { gallonsToCubicMetres } from '#shared/units/volume.ts';
import { BarFigure } from '#src/components/charts/bar-chart/bar-figure.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { waterWords } from './energy-view.ts';
import { labelOfSpan, type SpanAnswer, SpanTable } from './span-table.tsx';

const HEIGHT = 120;

export type WaterBarsProps = {
  readonly answer: SpanAnswer;
  /** Turnovers a day that the pool should have. */
  readonly wanted: number | null;
  readonly file: string;
};

/** Turnovers of each day beside those wanted; where the pool's volume is not known, the water moved. */
export function WaterBars({ answer, wanted, file }: WaterBarsProps) {
  const format = useFormat();
  const { spans } = answer;
  const turns = spans.some(({ turnovers }) => turnovers !== null);
  const data = useMemo(() => {
    const volume = (gallons: number) => (format.units === 'si' ? gallonsToCubicMetres(gallons) : gallons);
    return {
      labels: spans.map(({ from }) => format.dayOfMonth(from, answer.zone)),
      parts: [
        {
          label: t('energy.column.water'),
          values: spans.map(({ turnovers, water }) =>
            turns ? turnovers : water === null ? null : volume(water.gallons),
          ),
        },
      ],
      aim: turns ? (wanted ?? undefined) : undefined,
    };
  }, [spans, answer.zone, format, turns, wanted]);
  const describe = (index: number) => {
    const span = spans[index];
    if (span === undefined) return '';
    const { figure, sure } = waterWords(span.water, format);
    return t('energy.waterBar', { label: labelOfSpan(span, answer, format), water: `${figure}, ${sure}` });
  };
  if (spans.every(({ water }) => water === null || (water.gallons === 0 && water.unknownSeconds > 0))) return null;
  return (
    <BarFigure
      title={
        turns ? t('energy.water.days') : t('energy.water.daysVolume', { unit: format.units === 'si' ? 'm³' : 'gal' })
      }
      data={data}
      height={HEIGHT}
      least={1}
      describe={describe}
      aimLabel={t('energy.water.aim')}
      tableLabel={t('energy.water.table')}
      table={<SpanTable answer={answer} file={file} />}
    />
  );
}
