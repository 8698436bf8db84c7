import { useEffect, useRef } from 'react';
import UPlot from 'uplot';
import 'uplot/dist/uPlot.min.css';
import { readStripColours } from '#src/components/charts/strip/strip-colours.ts';
import { useElementWidth } from '#src/hooks/use-element-width.ts';
import { useStore } from '#src/hooks/use-store.ts';
import { themeStore } from '#src/lib/theme.ts';
import { type BarData, stackParts } from './bar-chart-data.ts';
import { barOptions } from './bar-chart-options.ts';

export type BarChartProps = {
  readonly data: BarData;
  readonly height: number;
  readonly least: number;
  /** How a value stands at the left. */
  readonly figure: (value: number) => string;
  /** What the picture is of, for those who do not see it; its numbers stand in a table beside it. */
  readonly name: string;
  /** The bar under the pointer. */
  readonly onPoint: (index: number | undefined) => void;
};

/** Bars in parts, each part in a texture of its own. */
export function BarChart({ data, height, least, figure, name, onPoint }: BarChartProps) {
  const [measure, width] = useElementWidth<HTMLDivElement>();
  const place = useRef<HTMLDivElement>(null);
  const theme = useStore(themeStore);
  useEffect(() => {
    if (place.current === null || width === 0) return;
    const colours = readStripColours(theme);
    const options = barOptions({ data, colours, width, height, least, figure, onPoint });
    const columns = [data.labels.map((_, index) => index), ...stackParts(data).toReversed()];
    const plot = new UPlot(options, columns as UPlot.AlignedData, place.current);
    return () => plot.destroy();
  }, [data, height, least, figure, onPoint, width, theme]);
  return (
    <div ref={measure} role="img" aria-label={name} style={{ height }}>
      <div ref={place} />
    </div>
  );
}
