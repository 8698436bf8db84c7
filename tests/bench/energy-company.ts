import { randomUUID } from 'node:crypto';
import { drizzle } from 'drizzle-orm/node-postgres';
import type pg from 'pg';
import { priceMonths } from '#server/rollup/price-months.ts';
import { RUN_SOURCES } from '#shared/domain/rollup/slice-sums.ts';
import { TIME_OF_USE } from '#tests/shared/domain/energy/sample-tariffs.ts';

const DAYS = 365;
const DAYS_OF_HOURS = 60;

/** A day of 24 hours in a zone without daylight saving, its values told apart by pump and day. */
const DAY = `insert into pump_days (pump_id, company_id, from_at, to_at, watt_hours, gallons, gallons_sigma, day, on_ms,
    covered_ms, unknown_flow_ms, readings, rpm_mean, rpm_min, rpm_max, watts_mean, watts_min, watts_max, source_ms)
  select p.id, p.company_id, d.day::timestamp at time zone 'America/Phoenix', (d.day + 1)::timestamp at time zone 'America/Phoenix',
    6000 + (p.number * 37 + (d.day - date '2020-01-01') * 13) % 6000, 21000, 1700, d.day, 36000000, 86400000, 0, 8640, 1700, 0, 3450, 600, 5,
    1800, $2
  from (select (now() at time zone 'America/Phoenix')::date - back as day from generate_series(0, $1::int - 1) back order by back desc) d
  cross join pumps p`;

const HOURS = `insert into pump_day_hours (pump_id, company_id, from_at, day, watt_hours, quarter_watt_hours, gallons, on_ms,
    covered_ms, unknown_flow_ms, rpm_mean, rpm_min, rpm_max, watts_mean, watts_min, watts_max)
  select pump_id, company_id, from_at, day, array_fill((watt_hours / 24)::real, array[24]), array_fill((watt_hours / 96)::real, array[24]),
    array_fill(875::real, array[24]), array_fill(1500000, array[24]), array_fill(3600000, array[24]), array_fill(0, array[24]),
    array_fill(1700::real, array[24]), array_fill(0::real, array[24]), array_fill(3450::real, array[24]),
    array_fill(600::real, array[24]), array_fill(5::real, array[24]), array_fill(1800::real, array[24])
  from pump_days where day > (now() at time zone 'America/Phoenix')::date - $1::int
    or pump_id = (select id from pumps order by number limit 1)`;

const MONTHS = `insert into pump_months (company_id, month, pump_id, priced_at, watt_hours, gallons, span_ms, covered_ms, on_ms,
    unknown_flow_ms, cost_minor, days, currency, lines, line_names, line_kwh,
    line_micros, saved)
  select company_id, date_trunc('month', day)::date, pump_id, now(), sum(watt_hours), sum(gallons), count(*) * 86400000, count(*) * 86400000,
    sum(on_ms), 0, round(sum(watt_hours) / 1000 * 20), count(*), 'USD',
    jsonb_build_array(jsonb_build_object('tariffId', $1::text, 'name', 'off-peak', 'kwh', sum(watt_hours) / 1000, 'micros', sum(watt_hours) * 120),
      jsonb_build_object('tariffId', $1::text, 'name', 'mid-peak', 'kwh', 10, 'micros', 3000000)),
    array['off-peak', 'mid-peak'], array[sum(watt_hours) / 1000, 10], array[sum(watt_hours) * 120, 3000000],
    jsonb_build_object('baselineKwh', 700, 'savedKwh', 400, 'sigmaKwh', 60, 'savedMicros', 80000000, 'sigmaMicros', 12000000, 'method', 'A')
  from pump_days group by company_id, date_trunc('month', day), pump_id order by 1, 2, 3`;

const COMPANY_DAYS = `insert into company_days (company_id, day, pumps, watt_hours, hour_watt_hours)
  select company_id, day, count(*), sum(watt_hours), array_fill(sum(watt_hours) / 24, array[24]) from pump_days group by company_id, day`;

/** Rollups of every pump of the one company: a year of days, 60 days of hours (of the first pump a year), its months. */
export async function addEnergyHistory(owner: pg.ClientBase): Promise<void> {
  const { rows } = await owner.query<{ id: string }>('select id from companies');
  const companyId = rows[0]?.id;
  const [tariffId, planId] = [randomUUID(), randomUUID()];
  await owner.query('insert into tariffs (id, company_id, name, tariff) values ($1, $2, $3, $4)', [
    tariffId,
    companyId,
    TIME_OF_USE.name,
    JSON.stringify(TIME_OF_USE),
  ]);
  await owner.query('insert into tariff_plans (id, company_id) values ($1, $2)', [planId, companyId]);
  await owner.query(
    `insert into tariff_terms (plan_id, company_id, tariff_id, from_day) values ($1, $2, $3, '2000-01-01')`,
    [planId, companyId, tariffId],
  );
  const sources = RUN_SOURCES.map((source) => (source === 'program' ? 36_000_000 : source === 'off' ? 50_400_000 : 0));
  // Nothing here can break a reference, and looking each one up would take longer than the rest.
  await owner.query(`set session_replication_role = replica; set synchronous_commit = off`);
  await owner.query(DAY, [DAYS, sources]);
  await owner.query(HOURS, [DAYS_OF_HOURS]);
  await owner.query(MONTHS, [tariffId]);
  await owner.query(COMPANY_DAYS);
  await owner.query(
    `insert into rollup_cursors (pump_id, company_id, rolled_to) select id, company_id, now() from pumps`,
  );
  await priceFirstPump(owner);
  await owner.query('vacuum analyze');
}

/** The pump whose year is asked for has its days priced as the worker prices them. */
async function priceFirstPump(owner: pg.ClientBase): Promise<void> {
  const { rows } =
    await owner.query(`select p.id as "pumpId", p.company_id as "companyId", p.pad_id as "padId", pad.zone
    from pumps p join pads pad on pad.id = p.pad_id order by p.number limit 1`);
  const [pump] = rows;
  const months = await owner.query<{ month: string }>(
    `select distinct date_trunc('month', day)::date::text as month from pump_days where pump_id = $1`,
    [pump.pumpId],
  );
  await priceMonths(
    drizzle(owner as pg.Client),
    { ...pump, highWater: Date.now() },
    months.rows.map(({ month }) => month),
    Date.now(),
  );
}
