import { instantOf } from '#shared/domain/time/instant-of.ts';
import { DAY_MS, HOUR_MS, localTime, MINUTE_MS } from '#shared/domain/time/local-time.ts';
import type { FleetRange } from './fleet-address.ts';

/** What the wall shows of time. `earlier` and `later` are the days its two buttons lead to; `later` undefined = live. */
export type WallWindow = {
  readonly from: number;
  readonly until: number;
  readonly live: boolean;
  readonly earlier: number;
  readonly later: number | undefined;
};

const STEP_MS = 15 * MINUTE_MS;
const DAYS: Readonly<Record<FleetRange, number>> = { '24h': 1, '7d': 7 };
/** Room right of now for what is planned. */
const AHEAD_MS: Readonly<Record<FleetRange, number>> = { '24h': 4 * HOUR_MS, '7d': 12 * HOUR_MS };

/**
 * The stretch of time on the wall. Live it moves with the clock in quarter hours, with a little of the plan ahead;
 * else it is whole calendar days of the company's zone, which on two days of the year last 23 or 25 hours.
 */
export function wallWindow(range: FleetRange, day: number | undefined, now: number, zone: string): WallWindow {
  const days = DAYS[range];
  const today = localTime(zone, now)?.epochDay ?? Math.floor(now / DAY_MS);
  if (day === undefined || day > today) {
    const here = Math.floor(now / STEP_MS) * STEP_MS;
    return {
      from: here - days * DAY_MS,
      until: here + STEP_MS + AHEAD_MS[range],
      live: true,
      earlier: today - 1,
      later: undefined,
    };
  }
  const from = instantOf(zone, day - days + 1, 0) ?? (day - days + 1) * DAY_MS;
  const until = instantOf(zone, day + 1, 0) ?? (day + 1) * DAY_MS;
  const later = day + days;
  return { from, until, live: false, earlier: day - days, later: later >= today ? undefined : later };
}
