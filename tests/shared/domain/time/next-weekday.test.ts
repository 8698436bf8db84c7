import { expect, it } from 'vitest';
import { nextWeekday } from '#shared/domain/time/next-weekday.ts';

const TUESDAY = Date.UTC(2026, 11, 1, 12);

it('finds the next day of the week, today among them, in the pad’s own calendar', () => {
  expect(nextWeekday('America/Phoenix', 4, TUESDAY)).toBe('2026-12-03');
  expect(nextWeekday('America/Phoenix', 2, TUESDAY)).toBe('2026-12-01');
  expect(nextWeekday('America/Phoenix', 1, TUESDAY)).toBe('2026-12-07');
  // Two in the morning of the Tuesday in Auckland is still Monday in Phoenix.
  expect(nextWeekday('Pacific/Auckland', 2, Date.UTC(2026, 10, 30, 13))).toBe('2026-12-01');
  expect(nextWeekday('America/Phoenix', 1, Date.UTC(2026, 10, 30, 13))).toBe('2026-11-30');
});

it('knows no such day where zone or weekday are none', () => {
  expect(nextWeekday('Mars/Olympus', 1, TUESDAY)).toBeUndefined();
  for (const weekday of [0, 8, 1.5, Number.NaN]) expect(nextWeekday('UTC', weekday, TUESDAY)).toBeUndefined();
});
