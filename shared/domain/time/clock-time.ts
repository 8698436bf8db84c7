import { DAY_MINUTES } from './local-time.ts';

/**
 * Minutes after midnight of a clock time written `HH:MM` in 24 hours, 00:00 to 24:00; undefined for anything else.
 *
 * @example parseClockTime('06:30') // 390
 * @example parseClockTime('24:00') // 1440
 * @example parseClockTime('6:30') // undefined
 */
export function parseClockTime(text: string): number | undefined {
  const match = /^(\d{2}):(\d{2})$/.exec(text);
  if (match === null) return undefined;
  const hours = Number(match[1]);
  const minutes = Number(match[2]);
  const total = hours * 60 + minutes;
  return minutes < 60 && total <= DAY_MINUTES ? total : undefined;
}

/**
 * A time of day in minutes after midnight (0 to 1440, rounded to the minute) as `HH:MM`; a time outside is taken
 * round the clock, and what is no number comes back as `--:--`.
 *
 * @example formatClockTime(390) // '06:30'
 */
export function formatClockTime(minute: number): string {
  if (!Number.isFinite(minute)) return '--:--';
  const whole = Math.round(minute);
  const ofDay = whole === DAY_MINUTES ? DAY_MINUTES : ((whole % DAY_MINUTES) + DAY_MINUTES) % DAY_MINUTES;
  return `${String(Math.floor(ofDay / 60)).padStart(2, '0')}:${String(ofDay % 60).padStart(2, '0')}`;
}

/**
 * The signed way round the clock from one time of day to another, in minutes, over -720 and up to 720.
 *
 * @example clockDifference(1430, 10) // 20
 */
export function clockDifference(fromMinute: number, toMinute: number): number {
  const forward = (((toMinute - fromMinute) % DAY_MINUTES) + DAY_MINUTES) % DAY_MINUTES;
  return forward > DAY_MINUTES / 2 ? forward - DAY_MINUTES : forward;
}
