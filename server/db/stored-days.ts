import { sql } from 'drizzle-orm';
import { listDayHours } from '#shared/domain/energy/day-hours.ts';
import type { BilledHour, DayUse } from '#shared/domain/energy/price-days.ts';
import { localDay } from '#shared/domain/time/local-days.ts';
import { epochDayOf } from './day-text.ts';
import type { Transaction } from './transaction.ts';

/** The hours of one stored day, as far as money and savings go by them. */
export type StoredHours = {
  readonly pumpId: string;
  readonly day: string;
  readonly wattHours: readonly (number | null)[];
  readonly quarterWattHours: readonly (number | null)[];
  readonly gallons: readonly (number | null)[];
  readonly onMs: readonly (number | null)[];
  readonly coveredMs: readonly (number | null)[];
};

/** What of the hours is asked for besides their energy: a year of arrays is slow to read for nothing. */
export type HoursNeeded = { readonly demand: boolean; readonly savings: boolean };

const EVERYTHING: HoursNeeded = { demand: true, savings: true };
const arrayOf = (column: string, isNeeded: boolean) =>
  isNeeded ? sql`array_to_json(${sql.identifier(column)})` : sql`'[]'::json`;

/** Local days from one to before another; with `months` (their first days) only those in one of them. */
export type HoursAsked = { readonly from: string; readonly until: string; readonly months?: readonly string[] };

/** Stored hours of some pumps over some local days, in order. */
export async function listStoredHours(
  db: Pick<Transaction, 'execute'>,
  pumpIds: readonly string[],
  { from, until, months }: HoursAsked,
  { demand, savings }: HoursNeeded = EVERYTHING,
): Promise<StoredHours[]> {
  const within =
    months === undefined ? sql`true` : sql`date_trunc('month', day)::date = any(${sql.param(months)}::date[])`;
  const { rows } = await db.execute<StoredHours>(sql`
    select pump_id as "pumpId", day::text as day, array_to_json(watt_hours) as "wattHours",
      ${arrayOf('quarter_watt_hours', demand)} as "quarterWattHours", ${arrayOf('gallons', savings)} as gallons,
      ${arrayOf('on_ms', savings)} as "onMs", ${arrayOf('covered_ms', savings)} as "coveredMs"
    from pump_day_hours
    where pump_id = any(${sql.param(pumpIds)}::uuid[]) and day >= ${from}::date and day < ${until}::date and ${within}
    order by pump_id, day`);
  return rows;
}

/** A stored day as prices and savings take it. Empty where its hours are not those of the zone: it was moved. */
export function toDayUse(zone: string, stored: StoredHours): DayUse {
  const epochDay = epochDayOf(stored.day);
  const day = localDay(zone, epochDay);
  const slices = day === undefined ? [] : listDayHours(zone, day);
  if (slices.length !== stored.wattHours.length) return { epochDay, hours: [] };
  return {
    epochDay,
    hours: slices.map(
      // Field by field: a year has nearly nine thousand of these, and a spread makes each one slow.
      ({ from, to, weekday, hour }, index): BilledHour => ({
        from,
        to,
        epochDay,
        weekday,
        hour,
        wattHours: stored.wattHours[index] ?? 0,
        quarterWattHours: stored.quarterWattHours[index] ?? 0,
        gallons: stored.gallons[index] ?? 0,
        turningMs: stored.onMs[index] ?? 0,
        coveredMs: stored.coveredMs[index] ?? 0,
      }),
    ),
  };
}
