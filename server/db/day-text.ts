import { DAY_MS } from '#shared/domain/time/local-time.ts';

/**
 * A local calendar day as the database and the contract write it.
 *
 * @example dayText(20_270) // '2025-07-01'
 */
export const dayText = (epochDay: number): string => new Date(epochDay * DAY_MS).toISOString().slice(0, 10);

/** A day's text counted from 1970-01-01. @example epochDayOf('2025-07-01') // 20270 */
export const epochDayOf = (day: string): number => Date.parse(day) / DAY_MS;

/** The first day of the month of a local day. @example monthStart(20_281) // '2025-07-01' */
export const monthStart = (epochDay: number): string => `${dayText(epochDay).slice(0, 7)}-01`;

/** The first day of the month after. @example nextMonth('2025-12-01') // '2026-01-01' */
export function nextMonth(month: string): string {
  const date = new Date(Date.parse(month));
  return new Date(Date.UTC(date.getUTCFullYear(), date.getUTCMonth() + 1, 1)).toISOString().slice(0, 10);
}

/** The first day of the month before. @example previousMonth('2026-01-01') // '2025-12-01' */
export function previousMonth(month: string): string {
  const date = new Date(Date.parse(month));
  return new Date(Date.UTC(date.getUTCFullYear(), date.getUTCMonth() - 1, 1)).toISOString().slice(0, 10);
}
