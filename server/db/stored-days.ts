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
  readonly onMs: readonly number[];
  readonly coveredMs: readonly number[];
  readonly unknownFlowMs: readonly number[];
};

/** Stored hours of some pumps from one local day to before another, in order. */
export async function listStoredHours(
  db: Pick<Transaction, 'execute'>,
  pumpIds: readonly string[],
  { from, until }: { readonly from: string; readonly until: string },
): Promise<StoredHours[]> {
  const { rows } = await db.execute<StoredHours>(sql`
    select pump_id as "pumpId", day::text as day, array_to_json(watt_hours) as "wattHours",
      array_to_json(quarter_watt_hours) as "quarterWattHours", array_to_json(gallons) as gallons,
      array_to_json(on_ms) as "onMs", array_to_json(covered_ms) as "coveredMs",
      array_to_json(unknown_flow_ms) as "unknownFlowMs"
    from pump_day_hours
    where pump_id = any(${sql.param(pumpIds)}::uuid[]) and day >= ${from}::date and day < ${until}::date
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
      (slice, index): BilledHour => ({
        ...slice,
        wattHours: stored.wattHours[index] ?? 0,
        quarterWattHours: stored.quarterWattHours[index] ?? 0,
        gallons: stored.gallons[index] ?? 0,
        turningMs: stored.onMs[index] ?? 0,
        coveredMs: stored.coveredMs[index] ?? 0,
      }),
    ),
  };
}
