import type uPlot from 'uplot';
import { axisLabel } from '#src/components/charts/strip/axis-label.ts';
import type { StripColours } from '#src/components/charts/strip/strip-colours.ts';
import type { StripWindow } from '#src/components/charts/strip/strip-run.ts';
import { listTicks } from '#src/components/charts/strip/strip-ticks.ts';
import type { CursorStore } from '#src/components/charts/strip/time-cursor.tsx';
import type { Format } from '#src/lib/format/create-format.ts';
import type { ChartLine } from './time-chart-data.ts';

/** Room for the figures at the left; the strip above keeps the same. */
export const CHART_GUTTER = 56;

export type ChartSetting = {
  readonly lines: readonly ChartLine[];
  readonly window: StripWindow;
  readonly zone: string;
  readonly format: Format;
  readonly colours: StripColours;
  readonly cursor: CursorStore;
  readonly width: number;
  readonly height: number;
  /** The scale reaches at least so far up. */
  readonly least: number;
};

const FONT = '500 13px "JetBrains Mono", monospace';
const LABEL_APART = 84;

const lineSeries = ({ label, dashed = false }: ChartLine, { ink, ink3 }: StripColours): uPlot.Series => ({
  label,
  stroke: dashed ? ink3 : ink,
  width: dashed ? 1.5 : 1.8,
  ...(dashed ? { dash: [4, 3] } : {}),
  points: { show: false },
});

const edge: uPlot.Series = { stroke: 'transparent', points: { show: false } };

/** Each band's edges lie right behind its line: high, then low. */
function listBands(lines: readonly ChartLine[], { wash }: StripColours): uPlot.Band[] {
  const bands: uPlot.Band[] = [];
  let index = 1;
  for (const { band } of lines) {
    if (band !== undefined) bands.push({ series: [index + 1, index + 2], fill: wash });
    index += band === undefined ? 1 : 3;
  }
  return bands;
}

function axes({ window, zone, format, colours, width }: ChartSetting): uPlot.Axis[] {
  const ticks = listTicks(window, zone, width - CHART_GUTTER, LABEL_APART);
  const grid = { stroke: colours.rule, width: 1 };
  const common = { stroke: colours.ink, font: FONT, grid, ticks: { show: false } };
  // A name that would be cut off at the right edge is left out; its line stays.
  const named = new Map(
    ticks
      .filter(({ x }) => x + LABEL_APART * 0.75 < width - CHART_GUTTER)
      .map(({ at, minute }) => [at / 1000, { at, minute }]),
  );
  return [
    {
      ...common,
      size: 28,
      align: 1,
      splits: () => ticks.map(({ at }) => at / 1000),
      values: (_, splits) =>
        splits.map((second) => {
          const tick = named.get(second);
          return tick === undefined ? '' : axisLabel(tick, window, zone, format);
        }),
    },
    { ...common, size: CHART_GUTTER, values: (_, splits) => splits.map((value) => format.number(value)) },
  ];
}

/** Everything uPlot is told but the data. Its cursor and ours are one. */
export function chartOptions(setting: ChartSetting): uPlot.Options {
  const { lines, colours, window, width, height, cursor, least } = setting;
  return {
    width,
    height,
    legend: { show: false },
    padding: [8, 0, 0, 0],
    scales: {
      x: { time: true, range: () => [window.from / 1000, window.until / 1000] },
      y: { range: (_, _low, high) => [0, Math.max(least, (high ?? 0) * 1.08)] },
    },
    series: [
      {},
      ...lines.flatMap((line) =>
        line.band === undefined ? [lineSeries(line, colours)] : [lineSeries(line, colours), edge, edge],
      ),
    ],
    bands: listBands(lines, colours),
    axes: axes(setting),
    cursor: { y: false, drag: { x: false, y: false }, points: { show: false } },
    hooks: {
      setCursor: [
        (plot) => {
          const { left, event } = plot.cursor;
          // Only what a pointer did: our own moves come from the store already.
          if (event === undefined || event === null || left === undefined || left < 0) return;
          cursor.set(Math.round(plot.posToVal(left, 'x') * 1000));
        },
      ],
    },
  };
}
