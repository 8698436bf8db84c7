import { instantOf } from '#shared/domain/time/instant-of.ts';
import { localDays } from '#shared/domain/time/local-days.ts';
import { HOUR_MS } from '#shared/domain/time/local-time.ts';
import type { StripWindow } from './strip-run.ts';

/** A ruled line, or the place of a time label. `hour` is the local hour of the zone the axis is in. */
export type StripTick = { readonly at: number; readonly x: number; readonly hour: number };

const HOUR_STEPS = [1, 2, 3, 6, 12, 24];
const DAY_STEPS = [1, 2, 7, 14];

/** Ticks at whole local hours, on the two odd days of the year too: a skipped hour has none, a doubled one has one. */
function ticksEvery(hours: number, window: StripWindow, zone: string, width: number): StripTick[] {
  const ticks: StripTick[] = [];
  for (const { epochDay } of localDays(zone, window.from, window.until)) {
    for (let hour = 0; hour < 24; hour += hours) {
      const at = instantOf(zone, epochDay, hour * 60);
      if (at === undefined || at < window.from || at >= window.until) continue;
      ticks.push({ at, hour, x: ((at - window.from) / (window.until - window.from)) * width });
    }
  }
  return ticks;
}

/** Local midnights, thinned to every `days` of them. */
const midnights = (days: number, window: StripWindow, zone: string, width: number) =>
  ticksEvery(24, window, zone, width).filter((_, index) => index % days === 0);

/** Ticks in the zone's local time with at least `apart` pixels between them: hours where they fit, else whole days. */
export function listTicks(window: StripWindow, zone: string, width: number, apart: number): StripTick[] {
  const pixelsAnHour = (width / (window.until - window.from)) * HOUR_MS;
  const hours = HOUR_STEPS.find((step) => step * pixelsAnHour >= apart);
  if (hours !== undefined) return ticksEvery(hours, window, zone, width);
  const days = DAY_STEPS.find((step) => step * 24 * pixelsAnHour >= apart) ?? 28;
  return midnights(days, window, zone, width);
}

/** The ruled lines: fine ones as close as 12 px, strong ones each quarter of a day, or each midnight over several days. */
export function listRules(
  window: StripWindow,
  zone: string,
  width: number,
): { fine: StripTick[]; strong: StripTick[] } {
  const strongHours = window.until - window.from > 48 * HOUR_MS ? 24 : 6;
  return {
    fine: listTicks(window, zone, width, 24),
    strong: ticksEvery(strongHours, window, zone, width),
  };
}
