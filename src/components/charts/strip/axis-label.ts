import { DAY_MINUTES, DAY_MS } from '#shared/domain/time/local-time.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/t.ts';
import type { StripWindow } from './strip-run.ts';
import type { StripTick } from './strip-ticks.ts';

/** What stands at a tick: words for the two ends of a twelve-hour day, days where the paper is longer than two. */
export function axisLabel(
  { at, minute }: Pick<StripTick, 'at' | 'minute'>,
  window: StripWindow,
  zone: string,
  format: Format,
): string {
  if (minute === 0 && window.until - window.from > 2 * DAY_MS) return format.day(at, zone);
  if (format.twelveHour && minute === 0) return t('strip.midnight');
  if (format.twelveHour && minute === DAY_MINUTES / 2) return t('strip.noon');
  return format.time(at, zone);
}
