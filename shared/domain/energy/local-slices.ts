import { localTime, MINUTE_MS } from '../time/local-time.ts';
import { type OffsetSpan, offsetSpanAt } from '../time/zone-offset.ts';

/** A stretch (ms, half-open) inside one wall-clock hour or a part of it. `weekday` 0 = Monday, `hour` 0 to 23. */
export type LocalSlice = {
  readonly from: number;
  readonly to: number;
  readonly epochDay: number;
  readonly weekday: number;
  readonly hour: number;
};

/** Parts of an hour that a tariff may ask for, minutes. */
export type SliceMinutes = 15 | 30 | 60;

/** The first shift of the clocks after `from` and before `limit`, else `limit`; a span may end without one. */
function shiftBefore(zone: string, from: OffsetSpan, limit: number): number {
  let span: OffsetSpan | undefined = from;
  while (span !== undefined && span.to < limit) {
    const next: OffsetSpan | undefined = offsetSpanAt(zone, span.to);
    if (next?.offsetMinutes !== from.offsetMinutes) return span.to;
    span = next;
  }
  return limit;
}

/**
 * Cuts a stretch (ms, half-open) at every wall-clock hour of a zone (or each 15 or 30 minutes) and at every shift of
 * its clocks: a day of 23 hours has no slice for the hour that was skipped, one of 25 hours has the doubled one twice.
 * Empty for an unknown zone or an empty stretch.
 *
 * @example listLocalSlices('America/New_York', springDay.from, springDay.to, 60).length // 23
 */
export function listLocalSlices(zone: string, from: number, to: number, minutes: SliceMinutes): LocalSlice[] {
  const slices: LocalSlice[] = [];
  let at = from;
  while (at < to) {
    const local = localTime(zone, at);
    const span = offsetSpanAt(zone, at);
    if (local === undefined || span === undefined) return [];
    const left = (minutes - (local.minute % minutes)) * MINUTE_MS;
    // Rounded to the millisecond: a minute of the day is a fraction.
    const end = Math.min(to, shiftBefore(zone, span, Math.max(at + 1, Math.round(at + left))));
    const { epochDay, weekday } = local;
    slices.push({ from: at, to: end, epochDay, weekday, hour: Math.floor(local.minute / 60) });
    at = end;
  }
  return slices;
}
