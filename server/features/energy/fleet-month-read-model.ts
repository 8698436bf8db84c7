import { sql } from 'drizzle-orm';
import { epochMs, instantOfMs } from '#server/db/epoch-ms.ts';
import type { Transaction } from '#server/db/transaction.ts';

/** Sums over a company's pumps in one month; money in the minor units of `currency`. */
export type FleetMonthRow = {
  readonly pumps: number;
  readonly wattHours: number;
  readonly gallons: number;
  readonly unknownFlowMs: number;
  readonly spanMs: number;
  readonly coveredMs: number;
  readonly onMs: number;
  readonly currency: string | null;
  readonly priced: number;
  readonly otherCurrencies: number;
  readonly costMinor: number | null;
  readonly savedPumps: number;
  readonly savedKwh: number;
  readonly savedSigmaKwh: number;
  readonly savedMicros: number;
  readonly savedSigmaMicros: number;
};

/** The month of a company: one range of the months' key, however many days and pumps. `currency` is the commonest. */
export async function findFleetMonth(db: Transaction, companyId: string, month: string): Promise<FleetMonthRow> {
  const { rows } = await db.execute<FleetMonthRow>(sql`
    with own as (select * from pump_months where company_id = ${companyId} and month = ${month}::date),
      commonest as (select currency from own where currency is not null group by currency order by count(*) desc, currency limit 1)
    select count(*)::int as pumps, coalesce(sum(watt_hours), 0)::float8 as "wattHours", coalesce(sum(gallons), 0)::float8 as gallons,
      coalesce(sum(unknown_flow_ms), 0)::float8 as "unknownFlowMs", coalesce(sum(span_ms), 0)::float8 as "spanMs",
      coalesce(sum(covered_ms), 0)::float8 as "coveredMs", coalesce(sum(on_ms), 0)::float8 as "onMs",
      (select currency from commonest) as currency,
      (count(*) filter (where currency is not null))::int as priced,
      (count(*) filter (where currency <> (select currency from commonest)))::int as "otherCurrencies",
      (sum(cost_minor) filter (where currency = (select currency from commonest)))::float8 as "costMinor",
      (count(*) filter (where saved is not null))::int as "savedPumps",
      coalesce(sum((saved ->> 'savedKwh')::float8), 0) as "savedKwh",
      coalesce(sqrt(sum(((saved ->> 'sigmaKwh')::float8) ^ 2)), 0) as "savedSigmaKwh",
      coalesce(sum((saved ->> 'savedMicros')::float8) filter (where currency = (select currency from commonest)), 0) as "savedMicros",
      coalesce(sqrt(sum(((saved ->> 'sigmaMicros')::float8) ^ 2) filter (where currency = (select currency from commonest))), 0)
        as "savedSigmaMicros"
    from own`);
  const [row] = rows;
  if (row === undefined) throw new Error('an aggregate answers one row');
  return row;
}

/** kWh and micros by the period's name, dearest first, of pumps priced in one currency. */
export async function listFleetPeriods(db: Transaction, companyId: string, month: string, currency: string) {
  const { rows } = await db.execute<{ name: string; kwh: number; micros: number }>(sql`
    select line.name, sum(line.kwh) as kwh, sum(line.micros) as micros
    from pump_months m cross join lateral jsonb_to_recordset(m.lines) as line(name text, kwh float8, micros float8)
    where m.company_id = ${companyId} and m.month = ${month}::date and m.currency = ${currency}
    group by line.name order by sum(line.micros) / nullif(sum(line.kwh), 0) desc nulls first, line.name`);
  return rows;
}

/** Days of the month with their hours, all pumps together. */
export async function listFleetDays(db: Transaction, companyId: string, from: string, until: string) {
  const { rows } = await db.execute<{
    day: string;
    pumps: number;
    wattHours: number;
    hours: (number | null)[];
  }>(sql`
    select day::text as day, pumps, watt_hours as "wattHours", array_to_json(hour_watt_hours) as hours from company_days
    where company_id = ${companyId} and day >= ${from}::date and day < ${until}::date order by day`);
  return rows;
}

/** How far the rollups of a company have come. `behindMs` is time of the month of which silent pumps say nothing. */
export async function findFleetProgress(
  db: Transaction,
  companyId: string,
  {
    from,
    to,
    freshMs,
    now,
  }: { readonly from: number; readonly to: number; readonly freshMs: number; readonly now: number },
) {
  const end = instantOfMs(Math.min(to, now));
  const { rows } = await db.execute<{
    upTo: number | null;
    pending: number;
    behindMs: number;
    firstMonth: string | null;
    region: string | null;
  }>(sql`
    select ${epochMs(sql`max(c.rolled_to) filter (where c.rolled_to > '-infinity')`)} as "upTo",
      (select count(distinct m.pump_id)::int from rollup_marks m where m.company_id = ${companyId}) as pending,
      coalesce(sum(extract(epoch from ${end} - greatest(c.rolled_to, ${instantOfMs(from)})) * 1000)
        filter (where c.rolled_to > '-infinity' and c.rolled_to < ${instantOfMs(now - freshMs)} and c.rolled_to < ${end}), 0)::float8
        as "behindMs",
      (select to_char(min(day), 'YYYY-MM') from company_days d where d.company_id = ${companyId}) as "firstMonth",
      (select choice.region from carbon_choices choice where choice.company_id = ${companyId}) as region
    from rollup_cursors c where c.company_id = ${companyId}`);
  const [row] = rows;
  if (row === undefined) throw new Error('an aggregate answers one row');
  return row;
}

/** The zone of a company, in which its months begin. */
export async function findCompanyZone(db: Transaction, companyId: string): Promise<string> {
  const { rows } = await db.execute<{ zone: string }>(sql`select zone from companies where id = ${companyId}`);
  return rows[0]?.zone ?? 'UTC';
}
