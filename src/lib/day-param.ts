import { DAY_MS } from '#shared/domain/time/local-time.ts';

/**
 * A local calendar day as it stands in an address.
 *
 * @example formatDayParam(20788) // '2026-12-01'
 */
export const formatDayParam = (epochDay: number): string => new Date(epochDay * DAY_MS).toISOString().slice(0, 10);

/**
 * The calendar day of an address, counted from 1970-01-01; undefined for anything that is no day.
 *
 * @example parseDayParam('2026-12-01') // 20788
 * @example parseDayParam('2026-02-30') // undefined
 */
export function parseDayParam(text: string | null): number | undefined {
  if (text === null || !/^\d{4}-\d{2}-\d{2}$/.test(text)) return undefined;
  const epochDay = Date.parse(`${text}T00:00:00Z`) / DAY_MS;
  return Number.isInteger(epochDay) && formatDayParam(epochDay) === text ? epochDay : undefined;
}
