import { tzOffset } from '@date-fns/tz';
import { isKnownZone } from './is-known-zone.ts';

/** A stretch of time, half-open in ms, through which a zone keeps one offset (minutes east of UTC). */
export type OffsetSpan = { readonly from: number; readonly to: number; readonly offsetMinutes: number };

/*
 * Asking the platform for an offset costs microseconds and a reading is worth less, so each zone is sampled once a
 * week and a week whose ends differ is halved down to the millisecond of the shift. No zone in the tz database has
 * shifted there and back within a week since 1970 (from memory); the shortest, Ramadan in Morocco, lasts a month.
 */
const WEEK_MS = 7 * 86_400_000;
const MOST_WEEKS_KEPT = 4096;
const LARGEST_INSTANT = 8.64e15;

type Zone = { readonly name: string; readonly weeks: Map<number, readonly OffsetSpan[]>; last: OffsetSpan };

const zones = new Map<string, Zone>();

/**
 * The zone's offset from UTC at an instant, in minutes, positive east; undefined for an unknown zone or an instant
 * that is no time.
 *
 * @example zoneOffsetAt('America/Phoenix', Date.UTC(2025, 6, 1)) // -420
 */
export function zoneOffsetAt(zone: string, at: number): number | undefined {
  return offsetSpanAt(zone, at)?.offsetMinutes;
}

/**
 * A stretch around an instant in which the offset stays the same: the whole stretch lies between two shifts, but it
 * may end sooner than the next shift. Undefined for an unknown zone or an instant that is no time.
 *
 * @example offsetSpanAt('Europe/Berlin', Date.UTC(2025, 2, 30, 1)) // { from: 1743296400000, to: …, offsetMinutes: 120 }
 */
export function offsetSpanAt(zone: string, at: number): OffsetSpan | undefined {
  const known = findZone(zone);
  if (known === undefined) return undefined;
  if (at >= known.last.from && at < known.last.to) return known.last;
  if (!(Math.abs(at) <= LARGEST_INSTANT - WEEK_MS)) return undefined;
  const span = weekSpans(known, Math.floor(at / WEEK_MS)).find((candidate) => at < candidate.to);
  if (span !== undefined) known.last = span;
  return span;
}

function findZone(name: string): Zone | undefined {
  const kept = zones.get(name);
  if (kept !== undefined || !isKnownZone(name)) return kept;
  const zone: Zone = { name, weeks: new Map(), last: { from: 0, to: 0, offsetMinutes: 0 } };
  zones.set(name, zone);
  return zone;
}

function weekSpans(zone: Zone, week: number): readonly OffsetSpan[] {
  const kept = zone.weeks.get(week);
  if (kept !== undefined) return kept;
  const spans = spansBetween(zone.name, week * WEEK_MS, (week + 1) * WEEK_MS);
  if (zone.weeks.size >= MOST_WEEKS_KEPT) zone.weeks.clear();
  zone.weeks.set(week, spans);
  return spans;
}

function spansBetween(zone: string, from: number, to: number): readonly OffsetSpan[] {
  const before = tzOffset(zone, new Date(from));
  const after = tzOffset(zone, new Date(to - 1));
  if (before === after) return [{ from, to, offsetMinutes: before }];
  let low = from;
  let high = to - 1;
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (tzOffset(zone, new Date(middle)) === before) low = middle;
    else high = middle;
  }
  return [
    { from, to: high, offsetMinutes: before },
    { from: high, to, offsetMinutes: after },
  ];
}
