import type { AlarmHealthQuery } from '#shared/contract/http/alarm-health.ts';
import type { HealthStretch } from '#shared/domain/alarm-health/health-figures.ts';
import { instantOf } from '#shared/domain/time/instant-of.ts';
import { localDayAt, localDays } from '#shared/domain/time/local-days.ts';
import { DAY_MS } from '#shared/domain/time/local-time.ts';

/** The last 30 days before today, and today as far as it has come. */
const USUAL_DAYS = 30;

const startOf = (zone: string, day: string): number =>
  instantOf(zone, Date.parse(`${day}T00:00:00Z`) / DAY_MS, 0) ?? Date.parse(`${day}T00:00:00Z`);

/** What is measured: the local days asked for, without the time before anything was known and after now. */
export function healthStretch(
  { from, until }: AlarmHealthQuery,
  { zone, beganAt, now }: { readonly zone: string; readonly beganAt: number; readonly now: number },
): HealthStretch {
  const today = localDayAt(zone, now)?.epochDay ?? Math.floor(now / DAY_MS);
  const wantedFrom = from === undefined ? (instantOf(zone, today - USUAL_DAYS, 0) ?? now) : startOf(zone, from);
  const wantedUntil = until === undefined ? now : startOf(zone, until);
  const end = Math.min(wantedUntil, now);
  const begin = Math.min(Math.max(wantedFrom, beganAt), end);
  return { from: begin, until: end, days: localDays(zone, begin, end) };
}
