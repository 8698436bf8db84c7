import type { LocalDay } from '../time/local-days.ts';
import { type CalendarMonth, calendarMonth, daysInMonth, isSameMonth } from './calendar-month.ts';
import type { Micros } from './money.ts';
import type { Tariff } from './tariff.ts';

export type FixedLine = { readonly month: CalendarMonth; readonly days: number; readonly micros: Micros };

/**
 * A tariff's fixed charge over whole local days, each its share of its calendar month. It belongs to the meter, not to
 * the pump: show it only where the pump has a meter of its own. Money in micros, not rounded.
 *
 * @example priceFixed(tariff, tenDaysOfJune) // [{ month: { year: 2026, month: 5 }, days: 10, micros: 4_000_000 }] at 12 a month
 */
export function priceFixed(tariff: Tariff, days: readonly LocalDay[]): FixedLine[] {
  const lines: { month: CalendarMonth; days: number; micros: Micros }[] = [];
  for (const { epochDay } of days) {
    const month = calendarMonth(epochDay);
    const share = tariff.fixedMicrosPerMonth / daysInMonth(month);
    const last = lines.at(-1);
    if (last !== undefined && isSameMonth(last.month, month)) {
      last.days += 1;
      last.micros = last.days * share;
    } else lines.push({ month, days: 1, micros: share });
  }
  return lines;
}
