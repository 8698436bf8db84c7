import { DAY_MS } from '../time/local-time.ts';

/** A calendar month; `month` 0 = January, as in the open rate-schedule shape. */
export type CalendarMonth = { readonly year: number; readonly month: number };

/**
 * The month of a local calendar day counted from 1970-01-01.
 *
 * @example calendarMonth(20_270) // { year: 2025, month: 6 }
 */
export function calendarMonth(epochDay: number): CalendarMonth {
  const date = new Date(epochDay * DAY_MS);
  return { year: date.getUTCFullYear(), month: date.getUTCMonth() };
}

/** Days in a month. @example daysInMonth({ year: 2028, month: 1 }) // 29 */
export const daysInMonth = ({ year, month }: CalendarMonth): number =>
  new Date(Date.UTC(year, month + 1, 0)).getUTCDate();

/** Whether two months are the same. */
export const isSameMonth = (left: CalendarMonth, right: CalendarMonth): boolean =>
  left.year === right.year && left.month === right.month;
