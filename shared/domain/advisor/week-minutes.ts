import type { PlannedRun } from '../control/plan.ts';
import { ORDINARY_WEEK } from '../energy/plan-week.ts';
import { DAY_MINUTES, MINUTE_MS } from '../time/local-time.ts';
import type { DailyWindow } from './pad-needs.ts';

export const WEEK_MINUTES = 7 * DAY_MINUTES;

/** A value for every minute of an ordinary week, Monday 00:00 first. */
export type WeekMinutes = Float64Array;

/**
 * Visits every minute of the week that a daily window holds, widened by a margin on both sides; Sunday night leads into
 * Monday. A window that ends at or before it begins ends the next day.
 */
export function visitMinutes(window: DailyWindow, marginMinutes: number, visit: (minute: number) => void): void {
  const length =
    window.toMinute > window.fromMinute
      ? window.toMinute - window.fromMinute
      : window.toMinute - window.fromMinute + DAY_MINUTES;
  const whole = Math.min(length + 2 * marginMinutes, WEEK_MINUTES);
  window.days.forEach((on, day) => {
    if (!on || day >= 7) return;
    const start = day * DAY_MINUTES + window.fromMinute - marginMinutes;
    for (let minute = 0; minute < whole; minute += 1) visit((start + minute + WEEK_MINUTES) % WEEK_MINUTES);
  });
}

/**
 * The speed of every minute of an ordinary week under its planned runs; a minute takes the run that holds its middle.
 *
 * @example speedsOfWeek(planWeek(settings, traits, windows))[6 * 60] // 1700 at six on Monday
 */
export function speedsOfWeek(runs: readonly Pick<PlannedRun, 'from' | 'to' | 'rpm'>[]): WeekMinutes {
  const speeds = new Float64Array(WEEK_MINUTES);
  for (const { from, to, rpm } of runs) {
    const first = Math.ceil((from - ORDINARY_WEEK.from) / MINUTE_MS - 0.5);
    const end = Math.ceil((to - ORDINARY_WEEK.from) / MINUTE_MS - 0.5);
    speeds.fill(rpm, Math.max(0, first), Math.max(0, Math.min(WEEK_MINUTES, end)));
  }
  return speeds;
}
