import type { LinkFacts } from '../link/link-facts.ts';
import { cutMs } from '../link/outage-time.ts';

/** A clock that has moved: by how many minutes it is late (negative: early), and between which instants it moved. */
export type ClockMove = {
  readonly lateMinutes: number;
  readonly goodAt: number;
  readonly badAt: number;
  /** Minutes that the pad's wall clock went forward in between. */
  readonly wallMinutes: number;
};

/** What equals a known cause does so within this, minutes. */
export const SAME_MINUTES = 10;
const SHORTEST_CUT_MINUTES = 15;
const MINUTE_MS = 60_000;

/**
 * The cut that made a clock late: power lost for as long as it is late. 0 where no such cut is known.
 *
 * @example cutMinutesOf({ lateMinutes: 182, goodAt, badAt, wallMinutes: 0 }, link) // 180 after a cut of three hours
 */
export function cutMinutesOf({ lateMinutes, goodAt, badAt }: ClockMove, link: LinkFacts): number {
  const cut = cutMs(link, goodAt, badAt) / MINUTE_MS;
  // A dial that stood for more than a day is late by the rest.
  const late = ((lateMinutes % 1440) + 1440) % 1440;
  return cut >= SHORTEST_CUT_MINUTES && Math.abs((cut % 1440) - late) <= SAME_MINUTES ? Math.round(cut) : 0;
}

/** Whether daylight saving moved the wall and not the clock. */
export function isDaylightSaving({ lateMinutes, wallMinutes }: ClockMove): boolean {
  return wallMinutes !== 0 && Math.abs(lateMinutes - wallMinutes) <= SAME_MINUTES;
}
