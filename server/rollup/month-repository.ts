import { sql } from 'drizzle-orm';
import { dayText, nextMonth } from '#server/db/day-text.ts';
import { instantOfMs } from '#server/db/epoch-ms.ts';
import type { Mark } from '#server/db/rollup-marks.ts';
import type { MonthLine, MonthSaved } from '#server/db/schema/pump-months.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { Bill } from '#shared/domain/energy/month-bill.ts';
import { localDayAt } from '#shared/domain/time/local-days.ts';
import type { TakenPump } from './rollup-work.ts';

/** First days of the months with stored hours that a stretch touches. */
export async function listMonthsOver(
  db: Pick<Transaction, 'execute'>,
  { pumpId, zone }: Pick<TakenPump, 'pumpId' | 'zone'>,
  { from, to }: Pick<Mark, 'from' | 'to'>,
): Promise<string[]> {
  const [first, last] = [localDayAt(zone, from), localDayAt(zone, to)];
  if (first === undefined || last === undefined) return [];
  const { rows } = await db.execute<{ month: string }>(sql`
    select distinct date_trunc('month', day)::date::text as month from pump_day_hours
    where pump_id = ${pumpId} and day >= date_trunc('month', ${dayText(first.epochDay)}::date)
      and day <= ${dayText(last.epochDay)}::date`);
  return rows.map(({ month }) => month);
}

/** A pump's calendar month, worked out. */
export type MonthWork = {
  readonly month: string;
  readonly days: number;
  readonly bill: Bill;
  readonly saved: MonthSaved | null;
};

/** Writes a month of a pump in the place of what was there. */
export async function writeMonth(
  db: Pick<Transaction, 'execute'>,
  { pumpId, companyId, highWater }: Pick<TakenPump, 'pumpId' | 'companyId' | 'highWater'>,
  { month, days, bill, saved }: MonthWork,
  now: number,
): Promise<void> {
  const lines: MonthLine[] = bill.lines.map(({ tariffId, name, kwh, micros }) => ({ tariffId, name, kwh, micros }));
  await db.execute(sql`
    insert into pump_months (company_id, month, pump_id, priced_at, watt_hours, gallons, span_ms, covered_ms, on_ms,
      unknown_flow_ms, cost_minor, days, currency, lines, line_names, line_kwh, line_micros, saved)
    select ${companyId}::uuid, ${month}::date, ${pumpId}::uuid, ${instantOfMs(now)}, coalesce(sum(watt_hours), 0),
      coalesce(sum(gallons), 0), coalesce(sum(known_ms), 0), coalesce(sum(covered_ms), 0), coalesce(sum(on_ms), 0),
      coalesce(sum(unknown_flow_ms), 0), ${bill.minorUnits ?? null}::bigint, ${days}::int,
      ${bill.currency ?? null}::text, ${JSON.stringify(lines)}::jsonb, ${sql.param(lines.map(({ name }) => name))}::text[],
      ${sql.param(lines.map(({ kwh }) => kwh))}::float8[], ${sql.param(lines.map(({ micros }) => micros))}::float8[],
      ${saved === null ? null : JSON.stringify(pickSaved(saved))}::jsonb
    from (select d.*, round(extract(epoch from least(d.to_at, ${instantOfMs(highWater)}) - d.from_at) * 1000)::bigint as known_ms from pump_days d
      where d.pump_id = ${pumpId}::uuid and d.day >= ${month}::date and d.day < ${nextMonth(month)}::date) own
    on conflict (company_id, month, pump_id) do update set priced_at = excluded.priced_at,
      watt_hours = excluded.watt_hours, gallons = excluded.gallons, span_ms = excluded.span_ms,
      covered_ms = excluded.covered_ms, on_ms = excluded.on_ms, unknown_flow_ms = excluded.unknown_flow_ms,
      cost_minor = excluded.cost_minor, days = excluded.days, currency = excluded.currency, lines = excluded.lines,
      line_names = excluded.line_names, line_kwh = excluded.line_kwh, line_micros = excluded.line_micros, saved = excluded.saved`);
}

const pickSaved = ({ baselineKwh, savedKwh, sigmaKwh, savedMicros, sigmaMicros, method }: MonthSaved): MonthSaved => ({
  baselineKwh,
  savedKwh,
  sigmaKwh,
  savedMicros,
  sigmaMicros,
  method,
});
