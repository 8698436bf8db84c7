import type { Preferences } from '#shared/contract/http/session.ts';
import { DAY_MINUTES, localTime } from '#shared/domain/time/local-time.ts';
import { formatNumber, formatQuantity } from '#shared/units/format-quantity.ts';
import type { Quantity } from '#shared/units/quantity-formats.data.ts';
import { t } from '../messages/t.ts';
import { formatMoney } from './format-money.ts';
import { formatSpan } from './format-span.ts';
import {
  formatDay,
  formatDayOfMonth,
  formatMinuteOfDay,
  formatTime,
  formatZoneName,
  isTwelveHour,
} from './format-time.ts';

export type FormatOptions = { readonly locale: string; readonly preferences: Pick<Preferences, 'units' | 'clock'> };

/** How one person reads figures: every screen asks this and none formats by itself. */
export type Format = ReturnType<typeof createFormat>;

/** @example createFormat({ locale: 'en-US', preferences: { units: 'us', clock: 'locale' } }).rpm(1400) // '1,400 rpm' */
export function createFormat({ locale, preferences: { units, clock } }: FormatOptions) {
  const style = { locale, clock };
  const twelveHour = isTwelveHour(locale, clock);
  const number = (value: number, digits = 0) => formatNumber(value, digits, locale);
  const quantity = (value: number | null | undefined, kind: Quantity) =>
    formatQuantity(value, kind, { system: units, locale });
  const time = (at: number, zone: string) => formatTime(at, zone, style);
  const day = (at: number, zone: string) => formatDay(at, zone, locale);
  const isSameDay = (left: number, right: number, zone: string) =>
    localTime(zone, left)?.epochDay === localTime(zone, right)?.epochDay;
  return {
    locale,
    units,
    twelveHour,
    number,
    /** Any quantity with its unit, kept in rpm, W, Wh, gpm, gallons, feet, psi or °C. */
    quantity,
    rpm: (value: number) => quantity(value, 'speed'),
    watts: (value: number) => quantity(value, 'power'),
    /** Decimal text of a currency; a dash where there is none. */
    money: (amount: string | null | undefined, currency: string | null) => formatMoney(amount, currency, locale),
    /** A price of a unit, to a thousandth of a cent. */
    price: (amount: string | null | undefined, currency: string | null) => formatMoney(amount, currency, locale, true),
    time,
    timeWithSeconds: (at: number, zone: string) => formatTime(at, zone, { ...style, seconds: true }),
    /** A clock's or program's time of day; the two ends of a twelve-hour day by their names. */
    minuteOfDay: (minute: number) => {
      const named =
        minute % DAY_MINUTES === 0 ? t('strip.midnight') : minute === DAY_MINUTES / 2 ? t('strip.noon') : undefined;
      return (twelveHour ? named : undefined) ?? formatMinuteOfDay(minute, style);
    },
    day,
    /** The day of the month and the month alone, for a chart's foot. */
    dayOfMonth: (at: number, zone: string) => formatDayOfMonth(at, zone, locale),
    dayWithYear: (at: number, zone: string) => formatDay(at, zone, locale, true),
    /** The time alone when it lies in today, else with its day. */
    moment: (at: number, zone: string, now: number) =>
      isSameDay(at, now, zone) ? time(at, zone) : `${day(at, zone)}, ${time(at, zone)}`,
    /** The day, by its word when it is today, and the time. */
    dayAndTime: (at: number, zone: string, now: number, today: string) =>
      `${isSameDay(at, now, zone) ? today : day(at, zone)} ${time(at, zone)}`,
    span: formatSpan,
    zoneName: (at: number, zone: string) => formatZoneName(at, zone, locale),
  };
}
