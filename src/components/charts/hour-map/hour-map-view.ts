/** A day of 24 wall-clock hours; null where nothing was read. */
export type HourRow = { readonly label: string; readonly values: readonly (number | null)[] };

/** Hours of a kind of day, each a rank: 0 the cheapest price, 1 the dearest. */
export type PriceRow = { readonly label: string; readonly ranks: readonly number[] };

export const HOURS = 24;
export const GUTTER = 72;
const ROW_HEIGHT = 14;
const PRICE_HEIGHT = 18;
const HEAD_HEIGHT = 24;
const GAP = 6;

/** Where everything lies, CSS pixels. */
export type HourLayout = {
  readonly cell: number;
  readonly headHeight: number;
  readonly priceTop: (index: number) => number;
  readonly priceHeight: number;
  readonly rowTop: (index: number) => number;
  readonly rowHeight: number;
  readonly height: number;
};

export function layoutHours(width: number, prices: number, rows: number): HourLayout {
  const priceTop = (index: number) => HEAD_HEIGHT + index * PRICE_HEIGHT;
  const bodyTop = HEAD_HEIGHT + prices * PRICE_HEIGHT + (prices > 0 ? GAP : 0);
  return {
    cell: Math.max(0, width - GUTTER) / HOURS,
    headHeight: HEAD_HEIGHT,
    priceTop,
    priceHeight: PRICE_HEIGHT,
    rowTop: (index) => bodyTop + index * ROW_HEIGHT,
    rowHeight: ROW_HEIGHT,
    height: bodyTop + rows * ROW_HEIGHT,
  };
}

/** A place in the picture: an hour of a row, or of a price row. */
export type HourPlace = { readonly kind: 'row' | 'price'; readonly index: number; readonly hour: number };

/** What lies under a point; undefined beside the cells. */
export function placeAt(x: number, y: number, layout: HourLayout, prices: number, rows: number): HourPlace | undefined {
  const hour = Math.floor((x - GUTTER) / layout.cell);
  if (layout.cell === 0 || hour < 0 || hour >= HOURS) return undefined;
  const price = Math.floor((y - layout.priceTop(0)) / layout.priceHeight);
  if (price >= 0 && price < prices) return { kind: 'price', index: price, hour };
  const row = Math.floor((y - layout.rowTop(0)) / layout.rowHeight);
  return row >= 0 && row < rows ? { kind: 'row', index: row, hour } : undefined;
}

/**
 * How dark a value is, 0 to 1: its share of the largest, in eight steps so that equal looks equal.
 *
 * @example darkness(1, 2) // 0.5
 */
export const darkness = (value: number, most: number): number =>
  most <= 0 || value <= 0 ? 0 : Math.ceil((value / most) * 8) / 8;

/**
 * Prices as ranks from 0, the cheapest, to 1, the dearest; all 0 where they are equal. Compared as numbers: they are only
 * ranked, never added.
 */
export function rankPrices(prices: readonly string[], all: readonly string[]): number[] {
  const steps = [...new Set(all.map(Number))].sort((a, b) => a - b);
  return prices.map((price) => (steps.length < 2 ? 0 : steps.indexOf(Number(price)) / (steps.length - 1)));
}
