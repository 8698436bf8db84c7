import { lazy, type ReactNode, Suspense, useCallback, useState } from 'react';
import { TableToggle } from '#src/components/ui/table-toggle.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { type BarData, inkOfPart } from './bar-chart-data.ts';
import { InkSwatch } from './ink-swatch.tsx';

/** The chart library comes only when a chart is looked at. */
const BarChart = lazy(async () => ({ default: (await import('./bar-chart.tsx')).BarChart }));

export type BarFigureProps = {
  /** What it shows, with its unit. */
  readonly title: string;
  readonly data: BarData;
  readonly height: number;
  readonly least: number;
  /** The sentence for a bar. */
  readonly describe: (index: number) => string;
  /** What is said while nobody points. */
  readonly idle?: string | undefined;
  /** What the dashed line is. */
  readonly aimLabel?: string | undefined;
  readonly tableLabel: string;
  readonly table: ReactNode;
};

const Ruled = ({ height }: { readonly height: number }) => <div className="ruled ml-14" style={{ height }} />;

/** Bars with their legend, the sentence for the bar under the pointer, and the table behind them. */
export function BarFigure(props: BarFigureProps) {
  const { title, data, height, least, describe, idle, aimLabel, tableLabel, table } = props;
  const [pointed, setPointed] = useState<number>();
  const format = useFormat();
  const figure = useCallback(
    (value: number) => format.number(value, Number.isInteger(value) ? 0 : Math.abs(value) < 0.1 ? 2 : 1),
    [format],
  );
  const onPoint = useCallback((index: number | undefined) => setPointed(index), []);
  return (
    <figure className="min-w-0">
      <figcaption className="flex flex-wrap items-center gap-x-4 gap-y-1 pb-1 text-13 text-ink-2">
        <span>{title}</span>
        {data.parts.length < 2
          ? null
          : data.parts.map(({ label }, index) => (
              <span key={label} className="inline-flex items-center gap-1.5">
                <InkSwatch ink={inkOfPart(index)} />
                {label}
              </span>
            ))}
        {data.aim === undefined || aimLabel === undefined ? null : (
          <span className="inline-flex items-center gap-1.5">
            <span aria-hidden="true" className="inline-block w-6 border-t-2 border-dashed border-ink" />
            {aimLabel}
          </span>
        )}
      </figcaption>
      <Suspense fallback={<Ruled height={height} />}>
        <BarChart data={data} height={height} least={least} figure={figure} name={title} onPoint={onPoint} />
      </Suspense>
      <p className="min-h-5 text-13 text-ink-2">{pointed === undefined ? idle : describe(pointed)}</p>
      <TableToggle label={tableLabel}>{table}</TableToggle>
    </figure>
  );
}
