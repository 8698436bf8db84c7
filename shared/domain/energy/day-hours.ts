import type { LocalDay } from '../time/local-days.ts';
import { HOUR_MS, weekdayOf } from '../time/local-time.ts';
import { zoneOffsetAt } from '../time/zone-offset.ts';
import { type LocalSlice, listLocalSlices } from './local-slices.ts';

const HOURS = 24;

/**
 * The wall-clock hours of a local day of a zone, in order: 23, 24 or 25 of them. The same as `listLocalSlices`, without
 * asking the zone for each hour of a day on which its clocks do not move.
 *
 * @example listDayHours('America/New_York', springDay).length // 23
 */
export function listDayHours(zone: string, day: LocalDay): LocalSlice[] {
  const { from, to, epochDay } = day;
  if (to - from !== HOURS * HOUR_MS || zoneOffsetAt(zone, from) !== zoneOffsetAt(zone, to - 1))
    return listLocalSlices(zone, from, to, 60);
  const weekday = weekdayOf(epochDay);
  return Array.from({ length: HOURS }, (_, hour) => {
    const start = from + hour * HOUR_MS;
    return { from: start, to: start + HOUR_MS, epochDay, weekday, hour };
  });
}
