import { describe, expect, it } from 'vitest';
import type { PumpNow, ReadingSeries } from '#shared/contract/http/pumps.ts';
import { chartAround, wattsBeside } from '#src/features/readings/evidence-chart-view.ts';
import { appendNow, tableRows } from '#src/features/readings/reading-view.ts';

const QUARTER = 900_000;
const series = (change: Partial<ReadingSeries> = {}): ReadingSeries => ({
  bucketMs: 300_000,
  t: [0, 300_000, QUARTER],
  rpm: [1000, 1100, null],
  rpmMin: [990, 1090, null],
  rpmMax: [1010, 1110, null],
  expectedRpm: [1000, 1000, 1000],
  watts: [100, 200, null],
  wattsMin: [90, 150, null],
  wattsMax: [110, 250, null],
  closedInputs: [0, 0, null],
  coverage: 0.6,
  ...change,
});
const now: PumpNow = {
  at: 1_000_000,
  rpm: 1200,
  watts: 130,
  closedInputs: 1,
  activeInput: 1,
  source: 'input',
  expectedSource: 'input',
  expectedRpm: 1200,
  until: null,
  lockedBy: 1,
  primed: true,
  flow: null,
  because: { kind: 'input' },
};

describe('a series that grows', () => {
  it('reaches the last reading without being read anew', () => {
    const grown = appendNow(series(), now, 2_000_000);
    expect(grown.t.at(-1)).toBe(1_000_000);
    expect([grown.rpm, grown.rpmMin, grown.rpmMax, grown.expectedRpm].map((column) => column.at(-1))).toEqual([
      1200, 1200, 1200, 1200,
    ]);
    expect(new Set(Object.values(grown).flatMap((column) => (Array.isArray(column) ? [column.length] : []))).size).toBe(
      1,
    );
  });

  it('takes no reading that is older than its last, or beyond the day', () => {
    expect(appendNow(series(), { ...now, at: QUARTER }, 2_000_000).t).toHaveLength(3);
    expect(appendNow(series(), now, 1_000_000).t).toHaveLength(3);
    expect(appendNow(series(), null, 2_000_000).t).toHaveLength(3);
  });
});

it('has its numbers in a table, a quarter of an hour a row, the latest first, gaps as gaps', () => {
  expect(tableRows(series())).toEqual([
    { at: QUARTER, rpm: null, expectedRpm: 1000, watts: null, wattsLow: null, wattsHigh: null },
    { at: 0, rpm: 1050, expectedRpm: 1000, watts: 150, wattsLow: 90, wattsHigh: 250 },
  ]);
});

describe('the chart around an alarm', () => {
  const HOUR = 3_600_000;

  it('begins shortly before and ends three hours after, or now', () => {
    const from = 10 * HOUR;
    expect(chartAround(from, 99 * HOUR)).toEqual({ from: 10 * HOUR - 600_000, until: 13 * HOUR });
    expect(chartAround(from, from + HOUR / 2)).toEqual({ from: 10 * HOUR - 600_000, until: 10.5 * HOUR });
    expect(chartAround(from, from).until - chartAround(from, from).from).toBe(HOUR / 2);
  });

  it('draws what would be usual only where that is known', () => {
    expect(wattsBeside(series(), 1450).lines[1]).toMatchObject({ values: [1450, 1450, 1450], dashed: true });
    expect(wattsBeside(series(), undefined).lines).toHaveLength(1);
  });
});
