const TIME_PATTERN = /^(\d{2}):(\d{2})$/;
const DAYS_PATTERN = /^[01]{7}$/;

/**
 * Minutes after midnight of a wall time `HH:MM`, 0 to 1440; undefined for anything else. `24:00` is 1440.
 *
 * @example parseMinuteOfDay('06:30') // 390
 */
export function parseMinuteOfDay(value: unknown): number | undefined {
  const parts = typeof value === 'string' ? TIME_PATTERN.exec(value) : null;
  if (parts === null) return undefined;
  const minuteOfHour = Number(parts[2]);
  const minute = Number(parts[1]) * 60 + minuteOfHour;
  return minuteOfHour < 60 && minute <= 1440 ? minute : undefined;
}

/**
 * Writes minutes after midnight, 0 to 1440, as `HH:MM`.
 *
 * @example formatMinuteOfDay(1440) // '24:00'
 */
export function formatMinuteOfDay(minute: number): string {
  const hours = Math.floor(minute / 60);
  return `${String(hours).padStart(2, '0')}:${String(minute % 60).padStart(2, '0')}`;
}

/**
 * Seven flags, Monday first, of a text of seven 0 and 1; undefined for anything else.
 *
 * @example parseDays('1000000') // [true, false, false, false, false, false, false]
 */
export function parseDays(value: unknown): boolean[] | undefined {
  if (typeof value !== 'string' || !DAYS_PATTERN.test(value)) return undefined;
  return Array.from(value, (flag) => flag === '1');
}

/** Writes seven flags, Monday first, as seven 0 and 1. */
export function formatDays(days: readonly boolean[]): string {
  return days.map((flag) => (flag ? '1' : '0')).join('');
}
