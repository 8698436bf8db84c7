import { type SQL, sql } from 'drizzle-orm';
import { epochMs, instantOfMs } from '#server/db/epoch-ms.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { ReadingBucket } from './reading-read-model.ts';

type Asked = { readonly pumpId: string; readonly from: number; readonly until: number };

/** Days of the rollups reach over the window by one on each side: they are local, the window is not. */
const dayOf = (ms: number): SQL => sql`${new Date(ms).toISOString().slice(0, 10)}::date`;

const binned = (steps: SQL, bucketMs: number, { from, until }: Asked): SQL => sql`
  select ${epochMs(sql`bucket`)} as at, avg(rpm)::float4 as rpm, min("rpmMin")::float4 as "rpmMin",
    max("rpmMax")::float4 as "rpmMax", avg(watts)::float4 as watts, min("wattsMin") as "wattsMin",
    max("wattsMax") as "wattsMax", coalesce(bit_or(inputs), 0) as "closedInputs"
  from (select date_bin(${`${bucketMs} milliseconds`}::interval, step.at, ${instantOfMs(from)}) as bucket, step.*
    from (${steps}) step
    where step.at >= ${instantOfMs(from)} and step.at < ${instantOfMs(until)} and step."rpmMax" is not null) placed
  group by bucket order by bucket`;

/** Steps of five minutes of days that are over, in buckets of some of them. */
export async function listFiveBuckets(db: Transaction, asked: Asked, bucketMs: number): Promise<ReadingBucket[]> {
  const steps = sql`
    select f.from_at + (s.place - 1) * interval '5 minutes' as at, s.rpm, s.low as "rpmMin", s.high as "rpmMax", s.watts,
      s.least as "wattsMin", s.most as "wattsMax", s.inputs
    from pump_day_fives f cross join lateral unnest(f.rpm_mean, f.rpm_min, f.rpm_max, f.watts_mean, f.watts_min, f.watts_max,
      f.closed_inputs) with ordinality as s(rpm, low, high, watts, least, most, inputs, place)
    where f.pump_id = ${asked.pumpId} and f.day >= ${dayOf(asked.from)} - 1 and f.day <= ${dayOf(asked.until)} + 1`;
  const { rows } = await db.execute<ReadingBucket>(binned(steps, bucketMs, asked));
  return rows;
}

/** Hours of a pump in buckets of some of them; means are over all of the hour, as readings would be. */
export async function listHourBuckets(db: Transaction, asked: Asked, bucketMs: number): Promise<ReadingBucket[]> {
  const steps = sql`
    select h.from_at + (s.place - 1) * interval '1 hour' as at,
      coalesce(s.rpm, 0) * s.on_ms / nullif(s.covered, 0) as rpm, s.low as "rpmMin", s.high as "rpmMax",
      s.wh * 3600000 / nullif(s.covered, 0) as watts, s.least as "wattsMin", s.most as "wattsMax", 0::int2 as inputs
    from pump_day_hours h cross join lateral unnest(h.rpm_mean, h.rpm_min, h.rpm_max, h.watt_hours, h.watts_min, h.watts_max,
      h.on_ms, h.covered_ms) with ordinality as s(rpm, low, high, wh, least, most, on_ms, covered, place)
    where h.pump_id = ${asked.pumpId} and h.day >= ${dayOf(asked.from)} - 1 and h.day <= ${dayOf(asked.until)} + 1`;
  const { rows } = await db.execute<ReadingBucket>(binned(steps, bucketMs, asked));
  return rows;
}

/**
 * Local days of a pump, or `days` of them together, each from its own midnight (the first from where the window begins):
 * one stored row a day, which is kept for ever.
 */
export async function listDayBuckets(db: Transaction, asked: Asked, days: number): Promise<ReadingBucket[]> {
  const { pumpId, from, until } = asked;
  const { rows } = await db.execute<ReadingBucket>(sql`
    select ${epochMs(sql`min(greatest(from_at, ${instantOfMs(from)}))`)} as at,
      avg(coalesce(rpm_mean, 0) * on_ms / nullif(covered_ms, 0))::float4 as rpm, min(rpm_min) as "rpmMin",
      max(rpm_max) as "rpmMax", avg(watt_hours * 3600000 / nullif(covered_ms, 0))::float4 as watts,
      min(watts_min) as "wattsMin", max(watts_max) as "wattsMax", 0 as "closedInputs"
    from pump_days
    where pump_id = ${pumpId} and day >= ${dayOf(from)} - 1 and day <= ${dayOf(until)} + 1
      and to_at > ${instantOfMs(from)} and from_at < ${instantOfMs(until)} and rpm_max is not null
    group by (day - ${dayOf(from)} + 1) / ${days}::int order by 1`);
  return rows;
}

/** Until when steps of five minutes are stored, ms; undefined without any. Later ones come from the readings. */
export async function findFivesEnd(db: Transaction, { pumpId, until }: Asked): Promise<number | undefined> {
  const { rows } = await db.execute<{ end: number | null }>(sql`
    select ${epochMs(sql`max(d.to_at)`)} as end from pump_day_fives f join pump_days d using (pump_id, day)
    where f.pump_id = ${pumpId} and f.from_at < ${instantOfMs(until)}`);
  return rows[0]?.end ?? undefined;
}

/** The part of a window that the days' readings cover, 0 to 1. */
export async function findCoverage(db: Transaction, { pumpId, from, until }: Asked, now: number): Promise<number> {
  const end = Math.min(until, now);
  if (end <= from) return 0;
  const { rows } = await db.execute<{ covered: number }>(sql`
    select coalesce(sum(d.covered_ms), 0)::float8 as covered from pump_days d
    where d.pump_id = ${pumpId} and d.to_at > ${instantOfMs(from)} and d.from_at < ${instantOfMs(end)}
      and d.day >= ${dayOf(from)} - 1 and d.day <= ${dayOf(end)} + 1`);
  return Math.min(1, Math.round(((rows[0]?.covered ?? 0) / (end - from)) * 10_000) / 10_000);
}
