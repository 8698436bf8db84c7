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

/** Sums over the pumps of a month that are priced in one currency, or in none. */
type CurrencyRow = Omit<FleetMonthRow, 'priced' | 'otherCurrencies' | 'savedSigmaKwh' | 'savedSigmaMicros'> & {
  readonly savedVariance: number;
  readonly savedMoneyVariance: number;
};

/** The month of a company: one range of the months' key, read once, however many days it has. `currency` is the commonest. */
export async function findFleetMonth(db: Transaction, companyId: string, month: string): Promise<FleetMonthRow> {
  const { rows } = await db.execute<CurrencyRow>(sql`
    select currency, count(*)::int as pumps, sum(watt_hours)::float8 as "wattHours", sum(gallons)::float8 as gallons,
      sum(unknown_flow_ms)::float8 as "unknownFlowMs", sum(span_ms)::float8 as "spanMs",
      sum(covered_ms)::float8 as "coveredMs", sum(on_ms)::float8 as "onMs", sum(cost_minor)::float8 as "costMinor",
      count(saved_kwh)::int as "savedPumps", coalesce(sum(saved_kwh), 0) as "savedKwh",
      coalesce(sum(saved_sigma_kwh * saved_sigma_kwh), 0) as "savedVariance",
      coalesce(sum(saved_micros), 0) as "savedMicros",
      coalesce(sum(saved_sigma_micros * saved_sigma_micros), 0) as "savedMoneyVariance"
    from pump_months where company_id = ${companyId} and month = ${month}::date group by currency`);
  return addCurrencies(rows);
}

function addCurrencies(rows: readonly CurrencyRow[]): FleetMonthRow {
  const sum = (value: (row: CurrencyRow) => number): number => rows.reduce((total, row) => total + value(row), 0);
  const priced = rows.filter(({ currency }) => currency !== null);
  const [commonest] = priced.toSorted(
    (left, right) => right.pumps - left.pumps || ((left.currency ?? '') < (right.currency ?? '') ? -1 : 1),
  );
  const pricedPumps = priced.reduce((total, { pumps }) => total + pumps, 0);
  return {
    pumps: sum(({ pumps }) => pumps),
    wattHours: sum(({ wattHours }) => wattHours),
    gallons: sum(({ gallons }) => gallons),
    unknownFlowMs: sum(({ unknownFlowMs }) => unknownFlowMs),
    spanMs: sum(({ spanMs }) => spanMs),
    coveredMs: sum(({ coveredMs }) => coveredMs),
    onMs: sum(({ onMs }) => onMs),
    currency: commonest?.currency ?? null,
    priced: pricedPumps,
    otherCurrencies: pricedPumps - (commonest?.pumps ?? 0),
    costMinor: commonest?.costMinor ?? null,
    savedPumps: sum(({ savedPumps }) => savedPumps),
    savedKwh: sum(({ savedKwh }) => savedKwh),
    savedSigmaKwh: Math.sqrt(sum(({ savedVariance }) => savedVariance)),
    savedMicros: commonest?.savedMicros ?? 0,
    savedSigmaMicros: Math.sqrt(commonest?.savedMoneyVariance ?? 0),
  };
}

/** kWh and micros by the period's name, dearest first, of pumps priced in one currency. */
export async function listFleetPeriods(db: Transaction, companyId: string, month: string, currency: string) {
  // One row of arrays becomes many of numbers in the select itself: a join would call a function for each pump.
  const { rows } = await db.execute<{ name: string; kwh: number; micros: number }>(sql`
    select name, sum(kwh) as kwh, sum(micros) as micros
    from (select unnest(line_names) as name, unnest(line_kwh) as kwh, unnest(line_micros) as micros from pump_months
      where company_id = ${companyId} and month = ${month}::date and currency = ${currency} offset 0) line
    group by name order by sum(micros) / nullif(sum(kwh), 0) desc nulls last, name`);
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
