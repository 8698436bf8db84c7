import { useEffect, useRef } from 'react';
import UPlot from 'uplot';
import 'uplot/dist/uPlot.min.css';
import { readStripColours } from '#src/components/charts/strip/strip-colours.ts';
import type { StripWindow } from '#src/components/charts/strip/strip-run.ts';
import type { CursorStore } from '#src/components/charts/strip/time-cursor.tsx';
import { useElementWidth } from '#src/hooks/use-element-width.ts';
import { useFormat } from '#src/hooks/use-format.ts';
import { useStore } from '#src/hooks/use-store.ts';
import { themeStore } from '#src/lib/theme.ts';
import { alignColumns, type ChartData } from './time-chart-data.ts';
import { chartOptions } from './time-chart-options.ts';

export type TimeChartProps = {
  readonly data: ChartData;
  readonly window: StripWindow;
  readonly zone: string;
  readonly cursor: CursorStore;
  readonly height: number;
  readonly least: number;
  /** What the picture is of, for those who do not see it; its numbers stand in a table beside it. */
  readonly name: string;
};

/** A chart over time. It shares its cursor with everything else on the page. */
export function TimeChart({ data, window, zone, cursor, height, least, name }: TimeChartProps) {
  const [measure, width] = useElementWidth<HTMLDivElement>();
  const place = useRef<HTMLDivElement>(null);
  const plot = useRef<UPlot>(undefined);
  const latest = useRef(data);
  latest.current = data;
  const format = useFormat();
  const theme = useStore(themeStore);
  const shape = data.lines.map(({ label }) => label).join();

  // biome-ignore lint/correctness/useExhaustiveDependencies: new data is set into the chart below; only another shape or look builds it anew.
  useEffect(() => {
    if (place.current === null || width === 0) return;
    const { lines } = latest.current;
    const options = chartOptions({
      lines,
      window,
      zone,
      format,
      colours: readStripColours(theme),
      cursor,
      width,
      height,
      least,
    });
    const made = new UPlot(options, alignColumns(latest.current) as UPlot.AlignedData, place.current);
    plot.current = made;
    const follow = () => {
      const at = cursor.get();
      const left = at === undefined ? -10 : made.valToPos(at / 1000, 'x');
      made.setCursor({ left, top: at === undefined ? -10 : 0 }, false);
    };
    const stop = cursor.subscribe(follow);
    return () => {
      stop();
      made.destroy();
    };
  }, [shape, window, zone, format, theme, cursor, width, height, least]);

  useEffect(() => {
    plot.current?.setData(alignColumns(data) as UPlot.AlignedData);
  }, [data]);

  return (
    <div ref={measure} role="img" aria-label={name} style={{ height }} onPointerLeave={() => cursor.set(undefined)}>
      <div ref={place} />
    </div>
  );
}
