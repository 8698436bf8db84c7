import { instantOf } from '#shared/domain/time/instant-of.ts';
import { MINUTE_MS, weekdayOf } from '#shared/domain/time/local-time.ts';
import { type KnownWindow, windowMinutes } from './known-window.ts';

/** No window is looked for further ahead than this, days. */
const DAYS_AHEAD = 8;

/**
 * When a window next opens after an instant: the first due day, counted from `day` (local days since 1970), whose
 * opening lies after it. Undefined where no day is due.
 *
 * @example nextOpening(window, 'America/Phoenix', facts.localDay, facts.now)
 */
export function nextOpening(window: KnownWindow, zone: string, day: number, after: number): number | undefined {
  for (let ahead = -1; ahead < DAYS_AHEAD; ahead += 1) {
    if (window.days[weekdayOf(day + ahead)] !== true) continue;
    const opens = instantOf(zone, day + ahead, window.onMinute);
    if (opens !== undefined && opens > after) return opens;
  }
  return undefined;
}

/** When a window that is or will be open next closes after an instant, in the same way. */
export function nextClosing(window: KnownWindow, zone: string, day: number, after: number): number | undefined {
  for (let ahead = -2; ahead < DAYS_AHEAD; ahead += 1) {
    if (window.days[weekdayOf(day + ahead)] !== true) continue;
    const opens = instantOf(zone, day + ahead, window.onMinute);
    if (opens === undefined) continue;
    const closes = opens + windowMinutes(window) * MINUTE_MS;
    if (closes > after) return closes;
  }
  return undefined;
}
