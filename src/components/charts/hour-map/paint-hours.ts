import type { StripColours } from '#src/components/charts/strip/strip-colours.ts';
import { patternFor } from '#src/components/charts/strip/strip-patterns.ts';
import { darkness, GUTTER, HOURS, type HourLayout, type HourRow, type PriceRow } from './hour-map-view.ts';

const FONT = '500 13px "JetBrains Mono", monospace';
const LABEL_EVERY_PX = 34;
/** Between one hour's name and the next. */
const LABEL_APART = 8;

export type HourPicture = {
  readonly rows: readonly HourRow[];
  readonly prices: readonly PriceRow[];
  readonly most: number;
  readonly hourLabel: (hour: number) => string;
  readonly layout: HourLayout;
  readonly width: number;
};

type Brush = {
  readonly context: CanvasRenderingContext2D;
  readonly colours: StripColours;
  readonly density: number;
};

/** Draws the hours of days: prices hatched above, days below, the darker the more. */
export function paintHours(brush: Brush, picture: HourPicture): void {
  const { context, colours } = brush;
  const { width, layout, rows, prices } = picture;
  context.clearRect(0, 0, width, layout.height);
  context.font = FONT;
  context.textBaseline = 'middle';
  paintHead(brush, picture);
  for (const [index, row] of prices.entries()) paintPrices(brush, picture, row, layout.priceTop(index));
  const labelEach = Math.ceil(LABEL_EVERY_PX / layout.rowHeight);
  rows.forEach((row, index) => {
    paintDay(brush, picture, row, layout.rowTop(index));
    if (index % labelEach !== 0) return;
    context.fillStyle = colours.ink;
    context.fillText(row.label, 0, layout.rowTop(index) + layout.rowHeight / 2, GUTTER - 8);
  });
}

function paintHead({ context, colours }: Brush, { layout, hourLabel }: HourPicture): void {
  context.fillStyle = colours.ink;
  const widest = Math.max(...[0, 6, 12, 18].map((hour) => context.measureText(hourLabel(hour)).width)) + LABEL_APART;
  const every = [3, 6, 12].find((hours) => layout.cell * hours >= widest) ?? HOURS;
  for (let hour = 0; hour < HOURS; hour += every) {
    context.fillText(hourLabel(hour), GUTTER + hour * layout.cell + 1, layout.headHeight / 2);
  }
}

function paintPrices({ context, colours, density }: Brush, { layout }: HourPicture, row: PriceRow, top: number): void {
  context.fillStyle = colours.ink;
  context.fillText(row.label, 0, top + layout.priceHeight / 2, GUTTER - 6);
  row.ranks.forEach((rank, hour) => {
    const x = GUTTER + hour * layout.cell;
    context.fillStyle =
      rank === 0
        ? colours.sheet
        : rank < 1
          ? patternFor('dots', 0, undefined, colours, density)
          : patternFor('hatch', 1, undefined, colours, density);
    context.fillRect(x, top, layout.cell, layout.priceHeight - 3);
    context.strokeStyle = colours.ruleStrong;
    context.strokeRect(x + 0.5, top + 0.5, layout.cell - 1, layout.priceHeight - 4);
  });
}

function paintDay(
  { context, colours, density }: Brush,
  { layout, most }: HourPicture,
  row: HourRow,
  top: number,
): void {
  row.values.forEach((value, hour) => {
    const x = GUTTER + hour * layout.cell;
    if (value === null) {
      context.fillStyle = patternFor('gap', 0, undefined, colours, density);
      context.fillRect(x, top, layout.cell, layout.rowHeight - 1);
      return;
    }
    context.fillStyle = colours.rule;
    context.fillRect(x, top + layout.rowHeight - 2, layout.cell, 1);
    context.globalAlpha = darkness(value, most) * 0.92;
    context.fillStyle = colours.ink;
    context.fillRect(x + 0.5, top, layout.cell - 1, layout.rowHeight - 2);
    context.globalAlpha = 1;
  });
}
