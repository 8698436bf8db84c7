import { type SQL, sql } from 'drizzle-orm';
import { likePattern } from '#server/db/like-pattern.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { SortKeys } from '#server/http/page-cursor.ts';
import type { PadMonthQuery } from '#shared/contract/http/energy-fleet.ts';

/** A pad's month with the key it was sorted by. */
export type PadMonthRow = {
  readonly rank: number;
  readonly padId: string;
  readonly padName: string;
  readonly customerName: string | null;
  readonly area: string | null;
  readonly poolGallons: number | null;
  readonly turnoversPerDay: number | null;
  readonly pumps: number;
  readonly wattHours: number;
  readonly gallons: number;
  readonly flowKnownMs: number;
  readonly onMs: number;
  readonly spanMs: number;
  readonly coveredMs: number;
  readonly currency: string | null;
  readonly costMinor: number | null;
  readonly savedKwh: number | null;
  readonly savedMicros: number | null;
  readonly previousWattHours: number | null;
};

/** A figure per volume is only honest where the flow was known for this much of the time. */
export const ENOUGH_FLOW = 0.9;
/** What a thousand gallons take is not said before so many have moved: on a month's first morning standby alone would. */
export const LEAST_GALLONS = 1000;

/** Ascending, so that a place in the list is one row comparison; what nobody knows comes last. */
const LAST = 1e18;
const RANK: Readonly<Record<PadMonthQuery['sort'], SQL>> = {
  cost: sql`coalesce(-cost_minor, ${LAST}::float8)`,
  kwh: sql`-watt_hours`,
  'per-volume': sql`case when gallons >= ${LEAST_GALLONS}::float8 and flow_known_ms >= ${ENOUGH_FLOW}::float8 * on_ms
    then -watt_hours / gallons else ${LAST}::float8 end`,
  rise: sql`coalesce(previous - watt_hours, ${LAST}::float8)`,
  saved: sql`coalesce(saved_kwh, ${LAST}::float8)`,
  coverage: sql`coalesce(covered_ms / nullif(span_ms, 0), 0)`,
  name: sql`0::float8`,
};

type Months = { readonly companyId: string; readonly month: string; readonly before: string; readonly days: number };

/** Watt-hours of a pad in as many days of the month before as this one has behind it. */
const earlierOf = (padId: SQL, { month, before, days }: Months): SQL =>
  sql`(select sum(d.watt_hours) from pumps own join pump_days d on d.pump_id = own.id
    where own.pad_id = ${padId} and d.day >= ${before}::date
      and d.day < least(${before}::date + ${days}::int, ${month}::date))`;

/** The month of every pad, one page of it, and how many there are. The month before counts as many days as this one has. */
export async function listPadMonths(
  db: Transaction,
  months: Months,
  query: PadMonthQuery,
  after: SortKeys | undefined,
): Promise<{ rows: PadMonthRow[]; matching: number }> {
  const { companyId, month } = months;
  const asked = [sql`true`];
  if (query.area !== undefined) asked.push(sql`pad.area = ${query.area}`);
  if (query.q !== undefined && query.q !== '')
    asked.push(sql`(pad.name ilike ${likePattern(query.q)} or customer.name ilike ${likePattern(query.q)})`);
  const where = sql.join(asked, sql` and `);
  const beyond =
    after === undefined
      ? sql`true`
      : sql`(rank, lower(pad_name), pad_id::text) > (${after[0]}::float8, lower(${after[1]}::text), ${after[2]}::text)`;
  const { rows } = await db.execute<PadMonthRow & { matching: number }>(sql`
    with sums as (
      select p.pad_id, count(*)::int as pumps, sum(m.watt_hours) as watt_hours,
        coalesce(sum(m.gallons) filter (where p.purpose = 'filter'), 0) as gallons,
        coalesce(sum(m.on_ms - m.unknown_flow_ms) filter (where p.purpose = 'filter'), 0)::float8 as flow_known_ms,
        coalesce(sum(m.on_ms) filter (where p.purpose = 'filter'), 0)::float8 as on_ms, sum(m.span_ms)::float8 as span_ms, sum(m.covered_ms)::float8 as covered_ms,
        case when count(distinct m.currency) = 1 and count(*) = count(m.currency) then min(m.currency) end as currency,
        case when count(distinct m.currency) = 1 and count(*) = count(m.currency) then sum(m.cost_minor)::float8 end as cost_minor,
        sum(m.saved_kwh) as saved_kwh, sum(m.saved_micros) as saved_micros
      from pump_months m join pumps p on p.id = m.pump_id
      where m.company_id = ${companyId} and m.month = ${month}::date group by p.pad_id),
    placed as (
      select s.*, pad.name as pad_name, pad.area, pad.pool_gallons, pad.turnovers_per_day, customer.name as customer_name,
        ${query.sort === 'rise' ? earlierOf(sql`s.pad_id`, months) : sql`null::float8`} as previous
      from sums s join pads pad on pad.id = s.pad_id
      left join pad_ownerships o on o.pad_id = pad.id and o.starts_at <= now() and (o.ends_at is null or o.ends_at > now())
      left join customers customer on customer.id = o.customer_id
      where ${where}),
    ranked as (select *, (${RANK[query.sort]})::float8 as rank from placed),
    shown as (select * from ranked where ${beyond} order by rank, lower(pad_name), pad_id::text limit ${query.limit + 1})
    select rank, shown.pad_id as "padId", pad_name as "padName", customer_name as "customerName", area,
      pool_gallons as "poolGallons", turnovers_per_day as "turnoversPerDay", pumps, shown.watt_hours as "wattHours", gallons,
      flow_known_ms as "flowKnownMs", on_ms as "onMs", span_ms as "spanMs", covered_ms as "coveredMs", currency,
      cost_minor as "costMinor", saved_kwh as "savedKwh", saved_micros as "savedMicros",
      ${earlierOf(sql`shown.pad_id`, months)} as "previousWattHours", (select count(*)::int from ranked) as matching
    from shown
    order by rank, lower(pad_name), shown.pad_id::text`);
  return { rows, matching: rows[0]?.matching ?? 0 };
}
