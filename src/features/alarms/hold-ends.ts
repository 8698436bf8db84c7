import { LONGEST_SHELF_MS } from '#shared/domain/alarms/set-aside.ts';
import { instantOf } from '#shared/domain/time/instant-of.ts';
import { DAY_MS, HOUR_MS, localTime } from '#shared/domain/time/local-time.ts';

export const HOLD_CHOICES = ['hour', 'fourHours', 'morning', 'stop', 'threeDays', 'week', 'other'] as const;
export type HoldChoice = (typeof HOLD_CHOICES)[number];

const MORNING_MINUTE = 8 * 60;
const STOP_OVER_MINUTE = 18 * 60;

/** Where and when a hold begins. `nextStopOn` is the day of the pad's next stop, `YYYY-MM-DD`. */
export type HoldPlace = { readonly zone: string; readonly nextStopOn: string | null; readonly now: number };

const epochDayOf = (day: string): number => Date.parse(`${day}T00:00:00Z`) / DAY_MS;

/** Whether a hold may end then: in the future, within a week. */
export const mayEndAt = (until: number | undefined, now: number): until is number =>
  until !== undefined && until > now && until - now <= LONGEST_SHELF_MS;

/**
 * When each choice ends a hold, ms, in the pad's time; choices that lead nowhere are left out, `other` is for the person
 * to say. The evening of a stop's day counts as after it.
 *
 * @example listHoldEnds({ zone: 'America/Phoenix', nextStopOn: null, now }).get('hour') // now + 3_600_000
 */
export function listHoldEnds({ zone, nextStopOn, now }: HoldPlace): ReadonlyMap<HoldChoice, number> {
  const today = localTime(zone, now)?.epochDay;
  const ends: readonly (readonly [HoldChoice, number | undefined])[] = [
    ['hour', now + HOUR_MS],
    ['fourHours', now + 4 * HOUR_MS],
    ['morning', today === undefined ? undefined : instantOf(zone, today + 1, MORNING_MINUTE)],
    ['stop', nextStopOn === null ? undefined : instantOf(zone, epochDayOf(nextStopOn), STOP_OVER_MINUTE)],
    ['threeDays', now + 3 * DAY_MS],
    // A minute less: the server's clock is asked a moment later.
    ['week', now + LONGEST_SHELF_MS - 60_000],
  ];
  return new Map(ends.flatMap(([choice, at]) => (mayEndAt(at, now) ? [[choice, at] as const] : [])));
}

/** A day and time at the pad, as a form has it (`2026-12-03T14:30`), as an instant; undefined where it is none. */
export function readPadTime(text: string, zone: string): number | undefined {
  const match = /^(\d{4}-\d{2}-\d{2})T(\d{2}):(\d{2})/.exec(text);
  if (match === null) return undefined;
  const day = epochDayOf(match[1] ?? '');
  return Number.isNaN(day) ? undefined : instantOf(zone, day, Number(match[2]) * 60 + Number(match[3]));
}
