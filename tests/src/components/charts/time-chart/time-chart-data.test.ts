import fc from 'fast-check';
import { expect, it } from 'vitest';
import { alignColumns, nearestIndex } from '#src/components/charts/time-chart/time-chart-data.ts';

it('lays out columns in seconds, each band’s edges behind its line', () => {
  expect(
    alignColumns({
      times: [1000, 2000],
      lines: [
        { label: 'measured', values: [1, null], band: { low: [0, null], high: [2, null] } },
        { label: 'expected', values: [3, 4] },
      ],
    }),
  ).toEqual([
    [1, 2],
    [1, null],
    [2, null],
    [0, null],
    [3, 4],
  ]);
});

it('finds the nearest time', () => {
  fc.assert(
    fc.property(
      fc.uniqueArray(fc.integer({ min: 0, max: 10_000 }), { minLength: 1, maxLength: 50 }),
      fc.integer({ min: -10, max: 11_000 }),
      (raw, at) => {
        const times = [...raw].sort((a, b) => a - b);
        const found = nearestIndex(times, at) ?? -1;
        const best = Math.min(...times.map((each) => Math.abs(each - at)));
        return Math.abs((times[found] ?? Number.NaN) - at) === best;
      },
    ),
  );
  expect(nearestIndex([], 5)).toBeUndefined();
});
