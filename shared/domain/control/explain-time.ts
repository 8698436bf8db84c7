import { DAY_MINUTES, DAY_MS, localTime } from '../time/local-time.ts';
import { fillMessage, type Message } from './fill-message.ts';

/** Beyond this a weekday alone would mislead. */
const MOST_DAYS_AHEAD = 6;

/**
 * A time of day (minutes after midnight, 1440 counts as midnight) in words: `9:30 PM`, `noon`, or `21:30`.
 *
 * @example sayMinute(1290, true, message) // '9:30 PM'
 */
export function sayMinute(minuteOfDay: number, hour12: boolean, message: Message): string {
  const minute = ((Math.round(minuteOfDay) % DAY_MINUTES) + DAY_MINUTES) % DAY_MINUTES;
  const hours = Math.floor(minute / 60);
  const minutes = String(minute % 60).padStart(2, '0');
  if (!hour12) return `${String(hours).padStart(2, '0')}:${minutes}`;
  if (minute === 0) return message('time.midnight');
  if (minute === DAY_MINUTES / 2) return message('time.noon');
  const time = `${hours % 12 === 0 ? 12 : hours % 12}${minutes === '00' ? '' : `:${minutes}`}`;
  return fillMessage(message(hours < 12 ? 'time.am' : 'time.pm'), { time });
}

type Moment = { readonly zone: string; readonly hour12: boolean; readonly message: Message };

/**
 * An instant ahead (ms) as the pad's wall time, with its weekday where the time alone would be ambiguous; undefined
 * where it is too far ahead, or the zone unknown.
 */
export function sayUntil(until: number, at: number, { zone, hour12, message }: Moment): string | undefined {
  const local = localTime(zone, until);
  if (local === undefined || until - at > MOST_DAYS_AHEAD * DAY_MS) return undefined;
  const time = sayMinute(local.minute, hour12, message);
  if (until - at < DAY_MS) return time;
  return fillMessage(message('time.weekday'), { weekday: message(weekdayKey(local.weekday)), time });
}

/** An instant ahead (ms) as `at 10 PM`, `tomorrow at 10 AM` or `on Monday at 10 AM`. */
export function sayWhen(then: number, at: number, { zone, hour12, message }: Moment): string {
  const local = localTime(zone, then);
  const now = localTime(zone, at);
  if (local === undefined || now === undefined) return '';
  const days = local.epochDay - now.epochDay;
  const time = sayMinute(local.minute, hour12, message);
  const key = days === 0 ? 'when.today' : days === 1 ? 'when.tomorrow' : 'when.weekday';
  return fillMessage(message(key), { time, weekday: message(weekdayKey(local.weekday)) });
}

const WEEKDAY_KEYS = [
  'weekday.0',
  'weekday.1',
  'weekday.2',
  'weekday.3',
  'weekday.4',
  'weekday.5',
  'weekday.6',
] as const;

function weekdayKey(weekday: number): (typeof WEEKDAY_KEYS)[number] {
  return WEEKDAY_KEYS[weekday] ?? 'weekday.0';
}
