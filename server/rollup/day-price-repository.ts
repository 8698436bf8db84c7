import { sql } from 'drizzle-orm';
import { dayText, nextMonth } from '#server/db/day-text.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { ComparedDay } from '#shared/domain/energy/compare-days.ts';
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

/**
 * Keeps what the days of a month compare to, beside what they cost; of those that are not in `days` that they do not. Without
 * a key the pump has no baseline.
 */
export async function writeComparedDays(
  db: Pick<Transaction, 'execute'>,
  { pumpId, month }: { readonly pumpId: string; readonly month: string },
  comparedBy: string | undefined,
  days: readonly ComparedDay[],
): Promise<void> {
  const rows = days.map(({ epochDay, before, after }) => ({
    day: dayText(epochDay),
    before_kwh: before.kwh,
    before_micros: before.micros,
    after_kwh: after.kwh,
    after_micros: after.micros,
  }));
  await db.execute(sql`
    update pump_days d set compared_by = ${comparedBy ?? null}, before_kwh = fresh.before_kwh,
      before_micros = fresh.before_micros, after_kwh = fresh.after_kwh, after_micros = fresh.after_micros
    from pump_days own left join json_to_recordset(${JSON.stringify(rows)}::json) as fresh(day date, before_kwh float8,
      before_micros float8, after_kwh float8, after_micros float8) on fresh.day = own.day
    where own.pump_id = ${pumpId}::uuid and own.day >= ${month}::date and own.day < ${nextMonth(month)}::date
      and d.pump_id = own.pump_id and d.day = own.day
      and (d.compared_by, d.before_kwh, d.before_micros, d.after_kwh, d.after_micros) is distinct from
        (${comparedBy ?? null}::text, fresh.before_kwh, fresh.before_micros, fresh.after_kwh, fresh.after_micros)`);
}
