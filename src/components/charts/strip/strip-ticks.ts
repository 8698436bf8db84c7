import { instantOf } from '#shared/domain/time/instant-of.ts';
import { localDays } from '#shared/domain/time/local-days.ts';
import { DAY_MINUTES, HOUR_MS, MINUTE_MS } from '#shared/domain/time/local-time.ts';
import type { StripWindow } from './strip-run.ts';

/** A ruled line, or the place of a time label. `minute` is the time of day in the zone of the axis. */
export type StripTick = { readonly at: number; readonly x: number; readonly minute: number };

const MINUTE_STEPS = [5, 10, 15, 30, 60, 120, 180, 360, 720, DAY_MINUTES];
const DAY_STEPS = [2, 7, 14];

/** Ticks at round local times, on the two odd days of the year too: a skipped time has none, a doubled one has one. */
function ticksEvery(minutes: number, window: StripWindow, zone: string, width: number): StripTick[] {
  const ticks: StripTick[] = [];
  for (const { epochDay } of localDays(zone, window.from, window.until)) {
    for (let minute = 0; minute < DAY_MINUTES; minute += minutes) {
      const at = instantOf(zone, epochDay, minute);
      if (at === undefined || at < window.from || at >= window.until || at === ticks.at(-1)?.at) continue;
      ticks.push({ at, minute, x: ((at - window.from) / (window.until - window.from)) * width });
    }
  }
  return ticks;
}

/** Local midnights, thinned to every `days` of them. */
const midnights = (days: number, window: StripWindow, zone: string, width: number) =>
  ticksEvery(DAY_MINUTES, window, zone, width).filter((_, index) => index % days === 0);

/** Ticks in the zone's local time with at least `apart` pixels between them: minutes or hours where they fit, else days. */
export function listTicks(window: StripWindow, zone: string, width: number, apart: number): StripTick[] {
  const pixelsAMinute = (width / (window.until - window.from)) * MINUTE_MS;
  const minutes = MINUTE_STEPS.find((step) => step * pixelsAMinute >= apart);
  if (minutes !== undefined) return ticksEvery(minutes, window, zone, width);
  const days = DAY_STEPS.find((step) => step * DAY_MINUTES * pixelsAMinute >= apart) ?? 28;
  return midnights(days, window, zone, width);
}

/** The ruled lines: fine ones as close as 24 px, strong ones each quarter of a day, or each midnight over several days. */
export function listRules(
  window: StripWindow,
  zone: string,
  width: number,
): { fine: StripTick[]; strong: StripTick[] } {
  const strongMinutes = window.until - window.from > 48 * HOUR_MS ? DAY_MINUTES : 360;
  return {
    fine: listTicks(window, zone, width, 24),
    strong: ticksEvery(strongMinutes, window, zone, width),
  };
}
