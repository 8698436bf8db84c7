import { DAY_MINUTES, DAY_MS, MINUTE_MS } from './local-time.ts';
import { offsetSpanAt, zoneOffsetAt } from './zone-offset.ts';

/**
 * The instant (ms) of a wall time: `minute` minutes after midnight of the local calendar day `epochDay`; minutes
 * below 0 or above 1440 reach into the neighbouring days. A wall time skipped by daylight saving is the instant of
 * the shift; a doubled one its first occurrence. Undefined for an unknown zone or a time that is no number.
 *
 * @example instantOf('Europe/Berlin', 20177, 150) // 1743296400000: 02:30 on 2025-03-30 does not exist, the shift is 01:00 UTC
 */
export function instantOf(zone: string, epochDay: number, minute: number): number | undefined {
  const wall = (epochDay * DAY_MINUTES + minute) * MINUTE_MS;
  const before = zoneOffsetAt(zone, wall - DAY_MS);
  const after = zoneOffsetAt(zone, wall + DAY_MS);
  if (before === undefined || after === undefined) return undefined;
  const first = wall - before * MINUTE_MS;
  if (zoneOffsetAt(zone, first) === before) return first;
  const second = wall - after * MINUTE_MS;
  if (zoneOffsetAt(zone, second) === after) return second;
  return shiftBetween(zone, second, first);
}

/** The wall time lies in the gap, so the old offset puts it past the shift and the new one puts it before. */
function shiftBetween(zone: string, from: number, to: number): number {
  let span = offsetSpanAt(zone, from);
  while (span !== undefined && span.to <= to) {
    const next = offsetSpanAt(zone, span.to);
    if (next === undefined || next.offsetMinutes !== span.offsetMinutes) return span.to;
    span = next;
  }
  return to;
}
