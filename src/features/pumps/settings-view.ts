import type { PumpDetail } from '#shared/contract/http/pumps.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/page-words.ts';

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

/** The settings beside the program, as name and value. */
export function listSettings(
  { settings }: Pick<PumpDetail, 'settings'>,
  format: Format,
): (readonly [string, string])[] {
  const { prime, timed, freeze, minRpm, maxRpm } = settings;
  const none = t('pump.settings.none');
  const lasting = (rpm: number, ms: number) =>
    t('pump.settings.primeValue', { rpm: format.rpm(rpm), span: format.span(ms) });
  return [
    [t('pump.settings.prime'), prime === null ? none : lasting(prime.rpm, prime.seconds * 1000)],
    [t('pump.settings.timed'), timed === null ? none : lasting(timed.rpm, timed.minutes * 60_000)],
    [
      t('pump.settings.freeze'),
      freeze === null
        ? none
        : t('pump.settings.freezeValue', {
            rpm: format.rpm(freeze.rpm),
            temperature: format.quantity(freeze.celsius, 'temperature'),
          }),
    ],
    [
      t('pump.settings.limits'),
      t('pump.settings.limitsValue', { min: format.number(minRpm), max: format.rpm(maxRpm) }),
    ],
  ];
}
