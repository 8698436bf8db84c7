import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  darkness,
  GUTTER,
  HOURS,
  layoutHours,
  placeAt,
  rankPrices,
} from '#src/components/charts/hour-map/hour-map-view.ts';

describe('the hours of days', () => {
  it('find under a point the cell whose middle it is', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 300, max: 1400 }),
        fc.integer({ min: 0, max: 2 }),
        fc.integer({ min: 1, max: 31 }),
        fc.nat(23),
        (width, prices, rows, hour) => {
          const layout = layoutHours(width, prices, rows);
          const x = GUTTER + (hour + 0.5) * layout.cell;
          const last = { kind: 'row', index: rows - 1, hour };
          expect(placeAt(x, layout.rowTop(rows - 1) + layout.rowHeight / 2, layout, prices, rows)).toEqual(last);
          if (prices > 0)
            expect(placeAt(x, layout.priceTop(0) + 2, layout, prices, rows)).toEqual({ kind: 'price', index: 0, hour });
        },
      ),
    );
  });

  it('find nothing beside the cells, or before there is a width', () => {
    const layout = layoutHours(600, 0, 3);
    expect(placeAt(10, layout.rowTop(1), layout, 0, 3)).toBeUndefined();
    expect(placeAt(GUTTER + HOURS * layout.cell + 1, layout.rowTop(1), layout, 0, 3)).toBeUndefined();
    expect(placeAt(GUTTER + 5, layout.height + 1, layout, 0, 3)).toBeUndefined();
    expect(placeAt(GUTTER + 5, 30, layoutHours(0, 0, 3), 0, 3)).toBeUndefined();
  });

  it('are the darker the more, in eight steps, and blank at nothing', () => {
    expect(darkness(0, 800)).toBe(0);
    expect(darkness(1, 800)).toBe(1 / 8);
    expect(darkness(400, 800)).toBe(1 / 2);
    expect(darkness(800, 800)).toBe(1);
    expect(darkness(5, 0)).toBe(0);
  });

  it('rank prices from the cheapest to the dearest, and equal ones as no one’s dear', () => {
    const all = ['0.24', '0.42', '0.31'];
    expect(rankPrices(['0.42', '0.240', '0.31'], all)).toEqual([1, 0, 0.5]);
    expect(rankPrices(['0.24', '0.24'], ['0.24'])).toEqual([0, 0]);
  });
});
