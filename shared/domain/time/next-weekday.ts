import { DAY_MS, localTime, weekdayOf } from './local-time.ts';

/**
 * The next calendar day, today or later, that is a weekday (1 = Monday to 7) in a zone, as `YYYY-MM-DD`; undefined for
 * an unknown zone or no such weekday.
 *
 * @example nextWeekday('America/Phoenix', 4, Date.UTC(2026, 11, 1, 12)) // '2026-12-03', a Thursday
 */
export function nextWeekday(zone: string, weekday: number, at: number): string | undefined {
  const local = localTime(zone, at);
  if (local === undefined || !Number.isInteger(weekday) || weekday < 1 || weekday > 7) return undefined;
  const wait = (weekday - 1 - weekdayOf(local.epochDay) + 7) % 7;
  return new Date((local.epochDay + wait) * DAY_MS).toISOString().slice(0, 10);
}
