import { zoneOffsetAt } from './zone-offset.ts';

export const MINUTE_MS = 60_000;
export const HOUR_MS = 3_600_000;
export const DAY_MS = 86_400_000;
export const DAY_MINUTES = 1440;

/**
 * Wall time at a pad. `epochDay` counts local calendar days since 1970-01-01; `weekday` 0 = Monday; `minute` is the
 * time of day in minutes with its fraction, 0 to under 1440; `second` the whole second within the minute.
 */
export type LocalTime = {
  readonly epochDay: number;
  readonly weekday: number;
  readonly minute: number;
  readonly second: number;
};

/**
 * The wall time of an instant (ms) in a zone; undefined for an unknown zone or an instant that is no time.
 *
 * @example localTime('America/Phoenix', Date.UTC(2025, 6, 1, 13, 30)) // { epochDay: 20270, weekday: 1, minute: 390, second: 0 }
 */
export function localTime(zone: string, at: number): LocalTime | undefined {
  const offset = zoneOffsetAt(zone, at);
  return offset === undefined ? undefined : wallTime(at + offset * MINUTE_MS);
}

/**
 * The parts of a wall time given as ms since 1970-01-01 00:00 on the same wall (`at` plus the zone's offset).
 *
 * @example wallTime(90_000) // { epochDay: 0, weekday: 3, minute: 1.5, second: 30 }
 */
export function wallTime(wallMs: number): LocalTime {
  const epochDay = Math.floor(wallMs / DAY_MS);
  const msOfDay = wallMs - epochDay * DAY_MS;
  return {
    epochDay,
    weekday: weekdayOf(epochDay),
    minute: msOfDay / MINUTE_MS,
    second: Math.floor((msOfDay % MINUTE_MS) / 1000),
  };
}

/**
 * The weekday of a calendar day counted from 1970-01-01, which was a Thursday; 0 = Monday to 6 = Sunday.
 *
 * @example weekdayOf(0) // 3
 */
export function weekdayOf(epochDay: number): number {
  return (((epochDay + 3) % 7) + 7) % 7;
}
