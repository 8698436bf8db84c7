import { DAY_MS } from '#shared/domain/time/local-time.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/t.ts';
import type { StripWindow } from './strip-run.ts';

/** What stands at a tick: words for the two ends of a twelve-hour day, days where the paper is longer than two. */
export function axisLabel(
  { at, hour }: { readonly at: number; readonly hour: number },
  window: StripWindow,
  zone: string,
  format: Format,
): string {
  if (hour === 0 && window.until - window.from > 2 * DAY_MS) return format.day(at, zone);
  if (format.twelveHour && hour === 0) return t('strip.midnight');
  if (format.twelveHour && hour === 12) return t('strip.noon');
  return format.time(at, zone);
}
