import fc from 'fast-check';
import { expect, it } from 'vitest';
import { visibleRange } from '#src/hooks/visible-range.ts';

it('is what is on the screen, with rows to spare', () => {
  expect(visibleRange({ listTop: 200, screen: 840, height: 64, count: 1000, spare: 0 })).toEqual({ first: 0, end: 10 });
  expect(visibleRange({ listTop: -6400, screen: 640, height: 64, count: 10_000, spare: 5 })).toEqual({
    first: 95,
    end: 115,
  });
});

it('holds every row that is in sight and never one that does not exist', () => {
  fc.assert(
    fc.property(
      fc.integer({ min: -700_000, max: 2000 }),
      fc.integer({ min: 1, max: 3000 }),
      fc.nat(10_000),
      (listTop, screen, count) => {
        const { first, end } = visibleRange({ listTop, screen, height: 64, count, spare: 2 });
        expect(first).toBeGreaterThanOrEqual(0);
        expect(end).toBeGreaterThanOrEqual(first);
        expect(end).toBeLessThanOrEqual(count);
        for (const row of [0, count - 1]) {
          const top = listTop + row * 64;
          if (row >= 0 && row < count && top + 64 > 0 && top < screen) expect(row >= first && row < end).toBe(true);
        }
      },
    ),
  );
});
