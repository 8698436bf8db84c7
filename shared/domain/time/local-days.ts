import { instantOf } from './instant-of.ts';
import { localTime } from './local-time.ts';

/** One local calendar day as the half-open stretch of instants (ms) it lasts: 23, 24 or 25 hours. */
export type LocalDay = { readonly epochDay: number; readonly from: number; readonly to: number };

/**
 * When a local calendar day begins and ends; undefined for an unknown zone.
 *
 * @example const day = localDay('America/New_York', 20156); // 2025-03-09: (day.to - day.from) / 3_600_000 === 23
 */
export function localDay(zone: string, epochDay: number): LocalDay | undefined {
  const from = instantOf(zone, epochDay, 0);
  const to = instantOf(zone, epochDay + 1, 0);
  return from === undefined || to === undefined ? undefined : { epochDay, from, to };
}

/**
 * The local day that holds an instant; undefined for an unknown zone.
 *
 * @example localDayAt('America/Phoenix', Date.UTC(2025, 6, 1, 13)) // { epochDay: 20270, from: 1751353200000, to: 1751439600000 }
 */
export function localDayAt(zone: string, at: number): LocalDay | undefined {
  const local = localTime(zone, at);
  return local === undefined ? undefined : localDay(zone, local.epochDay);
}

/**
 * Every local day that shares time with the half-open stretch from `from` to `to` (ms), in order, each in full.
 * Empty where the stretch is empty, and for an unknown zone.
 *
 * @example localDays('America/Phoenix', Date.UTC(2025, 6, 1), Date.UTC(2025, 6, 2)).length // 2
 */
export function localDays(zone: string, from: number, to: number): LocalDay[] {
  const days: LocalDay[] = [];
  if (!(from < to)) return days;
  let day = localDayAt(zone, from);
  while (day !== undefined && day.from < to) {
    if (day.to > from && day.to > day.from) days.push(day);
    day = localDay(zone, day.epochDay + 1);
  }
  return days;
}
