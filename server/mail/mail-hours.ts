import type { MailHours } from '#server/db/schema/companies.ts';
import { instantOf } from '#shared/domain/time/instant-of.ts';
import { localTime } from '#shared/domain/time/local-time.ts';

const DAYS_AHEAD = 8;

/**
 * When a company's mail hours next begin, ms, in its own zone; undefined inside them, and where they never begin.
 *
 * @example // Mondays from 07:00 to 19:00, asked on a Sunday: the Monday's 07:00
 * findMailHoursBegin({ days: [true, …], fromMinute: 420, toMinute: 1140 }, 'America/Phoenix', sunday)
 */
export function findMailHoursBegin(hours: MailHours, zone: string, now: number): number | undefined {
  const local = localTime(zone, now);
  if (local === undefined) return undefined;
  const isToday = hours.days[local.weekday] === true;
  if (isToday && local.minute >= hours.fromMinute && local.minute < hours.toMinute) return undefined;
  for (let ahead = 0; ahead < DAYS_AHEAD; ahead += 1) {
    if (hours.days[(local.weekday + ahead) % 7] !== true) continue;
    const begin = instantOf(zone, local.epochDay + ahead, hours.fromMinute);
    if (begin !== undefined && begin > now) return begin;
  }
  return undefined;
}
