import type { Preferences } from '#shared/contract/http/session.ts';
import { DAY_MINUTES, localTime } from '#shared/domain/time/local-time.ts';

export type ClockChoice = Preferences['clock'];

const formatters = new Map<string, Intl.DateTimeFormat>();

/** Building a formatter costs far more than using it: each is kept. */
const formatterFor = (locale: string, options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat => {
  const key = `${locale} ${JSON.stringify(options)}`;
  const formatter = formatters.get(key) ?? new Intl.DateTimeFormat(locale, options);
  formatters.set(key, formatter);
  return formatter;
};

/** Some platforms put a narrow space before AM, which the figures' font does not have. */
const plainSpaces = (text: string): string => text.replaceAll(/[\u202f\u2009]/g, '\u00a0');

/** Whether a person reads hours as 1 to 12: their choice, else their locale's habit. */
export function isTwelveHour(locale: string, clock: ClockChoice): boolean {
  if (clock !== 'locale') return clock === '12';
  return formatterFor(locale, { hour: 'numeric' }).resolvedOptions().hour12 === true;
}

export type TimeStyle = { readonly locale: string; readonly clock: ClockChoice; readonly seconds?: boolean };

/**
 * Time of day at a pad, in the pad's zone. A full hour of a twelve-hour clock drops its zeros.
 *
 * @example formatTime(Date.UTC(2026, 11, 1, 19, 30), 'UTC', { locale: 'en-US', clock: 'locale' }) // '7:30 PM'
 * @example formatTime(Date.UTC(2026, 11, 1, 18), 'UTC', { locale: 'en-US', clock: 'locale' }) // '6 PM'
 */
export function formatTime(at: number, zone: string, { locale, clock, seconds = false }: TimeStyle): string {
  const twelve = isTwelveHour(locale, clock);
  const local = localTime(zone, at);
  if (local === undefined) return '–';
  const fullHour = twelve && !seconds && Math.floor(local.minute) % 60 === 0;
  const options: Intl.DateTimeFormatOptions = {
    timeZone: zone,
    hour: twelve ? 'numeric' : '2-digit',
    hourCycle: twelve ? 'h12' : 'h23',
    ...(fullHour ? {} : { minute: '2-digit' }),
    ...(seconds ? { second: '2-digit' } : {}),
  };
  // The AM stays with its figures.
  return plainSpaces(formatterFor(locale, options).format(at)).replaceAll(' ', '\u00a0');
}

/** A time of day in minutes after midnight, as a clock or a program shows it; 1440 is the end of the day. */
export function formatMinuteOfDay(minute: number, style: TimeStyle): string {
  if (minute === DAY_MINUTES && !isTwelveHour(style.locale, style.clock)) return '24:00';
  return formatTime(minute * 60_000, 'UTC', style);
}

/**
 * The calendar day at a pad.
 *
 * @example formatDay(Date.UTC(2026, 11, 1), 'UTC', 'en-US') // 'Tue, Dec 1'
 */
export function formatDay(at: number, zone: string, locale: string, withYear = false): string {
  return plainSpaces(
    formatterFor(locale, {
      timeZone: zone,
      weekday: 'short',
      day: 'numeric',
      month: 'short',
      ...(withYear ? { year: 'numeric' } : {}),
    }).format(at),
  );
}

/**
 * The calendar day at a pad without its weekday.
 *
 * @example formatDayOfMonth(Date.UTC(2026, 11, 1), 'UTC', 'en-US') // 'Dec 1'
 */
export const formatDayOfMonth = (at: number, zone: string, locale: string): string =>
  plainSpaces(formatterFor(locale, { timeZone: zone, day: 'numeric', month: 'short' }).format(at));

/** The zone's name at an instant, as people there say it: "Mountain Standard Time". */
export function formatZoneName(at: number, zone: string, locale: string): string {
  const parts = formatterFor(locale, { timeZone: zone, timeZoneName: 'long' }).formatToParts(at);
  return parts.find(({ type }) => type === 'timeZoneName')?.value ?? zone;
}
