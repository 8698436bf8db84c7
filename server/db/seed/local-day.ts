import { instantOf } from '#shared/domain/time/instant-of.ts';

const DAY_MS = 86_400_000;

/** The instant at which a day `YYYY-MM-DD` begins in a zone. Throws where the zone is unknown: seed data are ours. */
export function startOfLocalDay(zone: string, day: string): Date {
  const instant = instantOf(zone, Math.floor(Date.parse(`${day}T00:00:00Z`) / DAY_MS), 0);
  if (instant === undefined) throw new Error(`No instant for ${day} in ${zone}`);
  return new Date(instant);
}
