import UPlot from 'uplot';
import type { StripColours } from '#src/components/charts/strip/strip-colours.ts';
import { patternFor } from '#src/components/charts/strip/strip-patterns.ts';
import { CHART_GUTTER } from '#src/components/charts/time-chart/time-chart-options.ts';
import { type BarData, inkOfPart, nameBars } from './bar-chart-data.ts';

const FONT = '500 13px "JetBrains Mono", monospace';
const LABEL_APART = 64;
const WIDEST_BAR = 46;
const BARS = UPlot.paths.bars?.({ size: [0.74, WIDEST_BAR] });

export type BarSetting = {
  readonly data: BarData;
  readonly colours: StripColours;
  readonly width: number;
  readonly height: number;
  /** The scale reaches at least so far up. */
  readonly least: number;
  readonly figure: (value: number) => string;
  readonly onPoint: (index: number | undefined) => void;
};

const fillOf = (part: number, colours: StripColours) => {
  const { texture, input } = inkOfPart(part);
  return texture === 'wash' ? colours.wash : patternFor(texture, input, undefined, colours, devicePixelRatio);
};

/** The tallest stack is drawn first: each lower part covers the foot of the one before. */
const series = ({ data, colours }: BarSetting): UPlot.Series[] =>
  data.parts.toReversed().map(({ label }, index) => ({
    label,
    stroke: colours.ink,
    width: 1,
    fill: () => fillOf(data.parts.length - 1 - index, colours),
    ...(BARS === undefined ? {} : { paths: BARS }),
    points: { show: false },
  }));

function drawAim(plot: UPlot, aim: number, colours: StripColours): void {
  const { ctx, bbox } = plot;
  const y = Math.round(plot.valToPos(aim, 'y', true)) + 0.5;
  ctx.save();
  ctx.strokeStyle = colours.ink;
  ctx.lineWidth = 1.5 * devicePixelRatio;
  ctx.setLineDash([4 * devicePixelRatio, 3 * devicePixelRatio]);
  ctx.beginPath();
  ctx.moveTo(bbox.left, y);
  ctx.lineTo(bbox.left + bbox.width, y);
  ctx.stroke();
  ctx.restore();
}

/** Everything uPlot is told but the data. */
export function barOptions(setting: BarSetting): UPlot.Options {
  const { data, colours, width, height, least, figure, onPoint } = setting;
  const { labels, aim } = data;
  const named = nameBars(labels.length, width - CHART_GUTTER, LABEL_APART);
  const common = { stroke: colours.ink, font: FONT, ticks: { show: false } };
  return {
    width,
    height,
    legend: { show: false },
    padding: [8, 0, 0, 0],
    scales: {
      x: { time: false, range: () => [-0.5, Math.max(0.5, labels.length - 0.5)] },
      y: { range: (_, _low, high) => [0, Math.max(least, (high ?? 0) * 1.06, (aim ?? 0) * 1.06)] },
    },
    series: [{}, ...series(setting)],
    axes: [
      {
        ...common,
        size: 28,
        grid: { show: false },
        splits: () => named,
        values: (_, splits) => splits.map((index) => labels[index] ?? ''),
      },
      {
        ...common,
        size: CHART_GUTTER,
        grid: { stroke: colours.rule, width: 1 },
        values: (_, splits) => splits.map((value) => figure(value)),
      },
    ],
    cursor: { x: false, y: false, drag: { x: false, y: false }, points: { show: false } },
    hooks: {
      ...(aim === undefined ? {} : { draw: [(plot) => drawAim(plot, aim, colours)] }),
      setCursor: [
        ({ cursor }) => {
          const { left, idx } = cursor;
          onPoint(left === undefined || left < 0 || idx === null ? undefined : idx);
        },
      ],
    },
  };
}
