import { localTime } from '#shared/domain/time/local-time.ts';
import { formatDayParam } from '#src/lib/day-param.ts';

/** A calendar month as it stands in an address: "2026-11". */
export type MonthText = string;

const MONTH = /^\d{4}-(0[1-9]|1[0-2])$/;

/** A month of an address; undefined for anything that is none. */
export const parseMonth = (text: string | null): MonthText | undefined =>
  text !== null && MONTH.test(text) ? text : undefined;

const startOf = (month: MonthText): Date => new Date(`${month}-01T00:00:00Z`);

/**
 * The month so many months later, or earlier.
 *
 * @example shiftMonth('2026-12', 1) // '2027-01'
 */
export function shiftMonth(month: MonthText, by: number): MonthText {
  const start = startOf(month);
  return new Date(Date.UTC(start.getUTCFullYear(), start.getUTCMonth() + by, 1)).toISOString().slice(0, 7);
}

/** The month of an instant at a pad. */
export const monthAt = (zone: string, at: number): MonthText => dayAt(zone, at).slice(0, 7);

/** The calendar day of an instant at a pad, as text. */
export const dayAt = (zone: string, at: number): string => formatDayParam(localTime(zone, at)?.epochDay ?? 0);

/** The earlier of two months, or of two days: an address may not ask for what is still to come. */
export const earlierOf = (left: string, right: string): string => [left, right].sort()[0] ?? left;

/** The day after a calendar day. */
export const dayAfter = (day: string): string =>
  new Date(Date.parse(`${day}T00:00:00Z`) + 86_400_000).toISOString().slice(0, 10);

/** So many days of a month say little of it yet. */
const FEW_DAYS = 3;

/**
 * The month a page shows when nobody asked for one: the present one, or the one before while the present has only begun.
 * `first` is the first month there is anything of, where it is known.
 *
 * @example usualMonth('2026-12-01', '2026-11') // '2026-11'
 * @example usualMonth('2026-12-04', '2026-11') // '2026-12'
 */
export function usualMonth(today: string, first: MonthText | undefined): MonthText {
  const present = today.slice(0, 7);
  const before = shiftMonth(present, -1);
  const isEarly = Number(today.slice(8)) <= FEW_DAYS;
  return isEarly && (first === undefined || first <= before) ? before : present;
}

/** A month's days, half-open, no further than `last` (a day, included). Undefined where the month lies after it. */
export function daysOfMonth(
  month: MonthText,
  last: string,
): { readonly from: string; readonly until: string } | undefined {
  const from = `${month}-01`;
  const until = [`${shiftMonth(month, 1)}-01`, dayAfter(last)].sort()[0] ?? from;
  return from < until ? { from, until } : undefined;
}

const names = new Map<string, Intl.DateTimeFormat>();
const nameFor = (locale: string, month: 'long' | 'short'): Intl.DateTimeFormat => {
  const key = `${locale} ${month}`;
  const made = names.get(key) ?? new Intl.DateTimeFormat(locale, { month, year: 'numeric', timeZone: 'UTC' });
  names.set(key, made);
  return made;
};

/** @example nameOfMonth('2026-11', 'en-US') // 'November 2026' */
export const nameOfMonth = (month: MonthText, locale: string, length: 'long' | 'short' = 'long'): string =>
  nameFor(locale, length).format(startOf(month));
