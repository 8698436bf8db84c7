import { expect, it } from 'vitest';
import { coverageOfDays } from '#server/features/energy/reckon-savings.ts';

const HOUR = 3_600_000;
const day = (index: number, coveredHours: number) => ({
  from: index * 24 * HOUR,
  to: (index + 1) * 24 * HOUR,
  coveredMs: coveredHours * HOUR,
});

it('covers what could be known: what is to come of today is no gap', () => {
  expect(coverageOfDays([day(0, 6)], 6 * HOUR)).toBe(1);
  expect(coverageOfDays([day(0, 24), day(1, 6)], 30 * HOUR)).toBe(1);
  expect(coverageOfDays([day(0, 12), day(1, 6)], 30 * HOUR)).toBe(0.6);
  expect(coverageOfDays([day(0, 12)], 30 * HOUR)).toBe(0.5);
  expect(coverageOfDays([], HOUR)).toBe(0);
});
