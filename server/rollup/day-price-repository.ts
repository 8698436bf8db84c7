import { sql } from 'drizzle-orm';
import { dayText } from '#server/db/day-text.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { PricedDay } from '#shared/domain/energy/price-days.ts';

/**
 * Keeps what the days of a month of a pump cost, beside what they used. Only days that cost something else now are written:
 * a month is priced each time one of its days is rolled up, and the others stay as they are.
 */
export async function writeDayPrices(
  db: Pick<Transaction, 'execute'>,
  pumpId: string,
  pricedBy: string,
  days: readonly PricedDay[],
): Promise<void> {
  const rows = days.map(({ epochDay, kwhByPeriod, energyMicrosByPeriod, demandMicros }) => ({
    day: dayText(epochDay),
    kwh: kwhByPeriod,
    micros: energyMicrosByPeriod,
    demand: demandMicros,
  }));
  await db.execute(sql`
    update pump_days d set priced_by = ${pricedBy}, kwh_by_period = fresh.kwh, energy_micros_by_period = fresh.micros,
      demand_micros = fresh.demand
    from json_to_recordset(${JSON.stringify(rows)}::json) as fresh(day date, kwh float8[], micros float8[], demand float8)
    where d.pump_id = ${pumpId}::uuid and d.day = fresh.day
      and (d.priced_by, d.kwh_by_period, d.energy_micros_by_period, d.demand_micros)
        is distinct from (${pricedBy}::text, fresh.kwh, fresh.micros, fresh.demand)`);
}
