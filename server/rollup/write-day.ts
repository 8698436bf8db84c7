import type pg from 'pg';
import { dayText } from '#server/db/day-text.ts';
import type { DayRollup } from '#shared/domain/rollup/roll-up-day.ts';
import type { SliceSums } from '#shared/domain/rollup/slice-sums.ts';
import type { TakenPump } from './rollup-work.ts';

type Database = Pick<pg.ClientBase, 'query'>;
type Key = Pick<TakenPump, 'pumpId' | 'companyId'>;

const WATT_MS_PER_WH = 3_600_000;
const wattHoursOf = ({ wattMs }: SliceSums): number => wattMs / WATT_MS_PER_WH;
const meanOf = (weighted: number, ms: number): number | null => (ms > 0 ? weighted / ms : null);
const covered = (slice: SliceSums, value: number): number | null => (slice.coveredMs > 0 ? value : null);

const DAY = `insert into pump_days (pump_id, company_id, day, from_at, to_at, watt_hours, gallons, gallons_sigma, on_ms, covered_ms,
    unknown_flow_ms, readings, rpm_mean, rpm_min, rpm_max, watts_mean, watts_min, watts_max, source_ms)
  values ($1, $2, $3, to_timestamp($4::float8 / 1000), to_timestamp($5::float8 / 1000), $6, $7, $8, $9, $10, $11, $12, $13,
    $14, $15, $16, $17, $18, $19)
  on conflict (pump_id, day) do update set from_at = excluded.from_at, to_at = excluded.to_at,
    watt_hours = excluded.watt_hours, gallons = excluded.gallons,
    gallons_sigma = excluded.gallons_sigma, on_ms = excluded.on_ms, covered_ms = excluded.covered_ms,
    unknown_flow_ms = excluded.unknown_flow_ms, readings = excluded.readings, rpm_mean = excluded.rpm_mean,
    rpm_min = excluded.rpm_min, rpm_max = excluded.rpm_max, watts_mean = excluded.watts_mean,
    watts_min = excluded.watts_min, watts_max = excluded.watts_max, source_ms = excluded.source_ms`;

const HOURS = `insert into pump_day_hours (pump_id, company_id, day, from_at, watt_hours, quarter_watt_hours, gallons, on_ms,
    covered_ms, unknown_flow_ms, rpm_mean, rpm_min, rpm_max, watts_mean, watts_min, watts_max, wall_hours)
  values ($1, $2, $3, to_timestamp($4::float8 / 1000), $5, $6, $7, $8, $9, $10, $11, $12, $13, $14, $15, $16, $17)
  on conflict (pump_id, day) do update set from_at = excluded.from_at, watt_hours = excluded.watt_hours,
    quarter_watt_hours = excluded.quarter_watt_hours, gallons = excluded.gallons, on_ms = excluded.on_ms,
    covered_ms = excluded.covered_ms, unknown_flow_ms = excluded.unknown_flow_ms, rpm_mean = excluded.rpm_mean,
    rpm_min = excluded.rpm_min, rpm_max = excluded.rpm_max, watts_mean = excluded.watts_mean,
    watts_min = excluded.watts_min, watts_max = excluded.watts_max, wall_hours = excluded.wall_hours`;

const FIVES = `insert into pump_day_fives (pump_id, company_id, day, from_at, watt_hours, rpm_mean, rpm_min, rpm_max,
    watts_mean, watts_min, watts_max, closed_inputs)
  values ($1, $2, $3, to_timestamp($4::float8 / 1000), $5, $6, $7, $8, $9, $10, $11, $12)
  on conflict (pump_id, day) do update set from_at = excluded.from_at, watt_hours = excluded.watt_hours,
    rpm_mean = excluded.rpm_mean, rpm_min = excluded.rpm_min, rpm_max = excluded.rpm_max, watts_mean = excluded.watts_mean,
    watts_min = excluded.watts_min, watts_max = excluded.watts_max, closed_inputs = excluded.closed_inputs`;

/** Writes a day of a pump and its hours in the place of what was there; with `isOver` its steps of five minutes too. */
export async function writeDay(database: Database, key: Key, rollup: DayRollup, isOver: boolean): Promise<void> {
  const { whole, day } = rollup;
  await database.query({
    name: 'rollup-day',
    text: DAY,
    values: [
      key.pumpId,
      key.companyId,
      dayText(day.epochDay),
      day.from,
      day.to,
      wattHoursOf(whole),
      whole.gallons,
      Number.isNaN(whole.gallonsSigma) ? null : whole.gallonsSigma,
      Math.round(whole.onMs),
      Math.round(whole.coveredMs),
      Math.round(whole.unknownFlowMs),
      whole.readings,
      meanOf(whole.onRpmMs, whole.onMs),
      whole.rpmMin ?? null,
      whole.rpmMax ?? null,
      meanOf(whole.onWattMs, whole.onMs),
      whole.wattsMin ?? null,
      whole.wattsMax ?? null,
      whole.sourceMs.map(Math.round),
    ],
  });
  await writeHours(database, key, rollup);
  if (isOver) await writeFives(database, key, rollup);
}

async function writeHours(database: Database, key: Key, { day, hours }: DayRollup): Promise<void> {
  await database.query({
    name: 'rollup-hours',
    text: HOURS,
    values: [
      key.pumpId,
      key.companyId,
      dayText(day.epochDay),
      day.from,
      hours.map((hour) => covered(hour, wattHoursOf(hour))),
      hours.map((hour) => covered(hour, hour.quarterWattHours)),
      hours.map((hour) => covered(hour, hour.gallons)),
      hours.map(({ onMs }) => Math.round(onMs)),
      hours.map(({ coveredMs }) => Math.round(coveredMs)),
      hours.map(({ unknownFlowMs }) => Math.round(unknownFlowMs)),
      hours.map(({ onRpmMs, onMs }) => meanOf(onRpmMs, onMs)),
      hours.map(({ rpmMin }) => rpmMin ?? null),
      hours.map(({ rpmMax }) => rpmMax ?? null),
      hours.map(({ onWattMs, onMs }) => meanOf(onWattMs, onMs)),
      hours.map(({ wattsMin }) => wattsMin ?? null),
      hours.map(({ wattsMax }) => wattsMax ?? null),
      hours.map(({ hour }) => hour),
    ],
  });
}

const whole = (value: number | undefined): number | null => (value === undefined ? null : Math.round(value));

async function writeFives(database: Database, key: Key, { day, fives }: DayRollup): Promise<void> {
  await database.query({
    name: 'rollup-fives',
    text: FIVES,
    values: [
      key.pumpId,
      key.companyId,
      dayText(day.epochDay),
      day.from,
      fives.map((five) => covered(five, wattHoursOf(five))),
      fives.map(({ onRpmMs, coveredMs }) => meanOf(onRpmMs, coveredMs)),
      fives.map(({ rpmMin }) => whole(rpmMin)),
      fives.map(({ rpmMax }) => whole(rpmMax)),
      fives.map(({ wattMs, coveredMs }) => meanOf(wattMs, coveredMs)),
      fives.map(({ wattsMin }) => wattsMin ?? null),
      fives.map(({ wattsMax }) => wattsMax ?? null),
      fives.map((five) => covered(five, five.closedInputs)),
    ],
  });
}
