import type { PumpDetail } from '#shared/contract/http/pumps.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/page-words.ts';

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
