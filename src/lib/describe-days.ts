import { t } from './messages/page-words.ts';

const WEEKDAYS = '1111100';
const WEEKEND = '0000011';
/** A Monday, for the names of days. */
const MONDAY = Date.UTC(2024, 0, 1);

/**
 * Days of an entry in a few words; the flags run Monday to Sunday.
 *
 * @example describeDays([true, true, true, true, true, false, false], 'en-US') // 'Mon to Fri'
 */
export function describeDays(days: readonly boolean[], locale: string): string {
  const flags = days.map((on) => (on ? '1' : '0')).join('');
  if (!flags.includes('0')) return t('pump.days.every');
  if (flags === WEEKDAYS) return t('pump.days.weekdays');
  if (flags === WEEKEND) return t('pump.days.weekend');
  const name = new Intl.DateTimeFormat(locale, { weekday: 'short', timeZone: 'UTC' });
  return days.flatMap((on, index) => (on ? [name.format(MONDAY + index * 86_400_000)] : [])).join(', ');
}
