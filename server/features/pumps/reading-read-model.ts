import { sql } from 'drizzle-orm';
import { epochMs, instantOfMs } from '#server/db/epoch-ms.ts';
import type { Transaction } from '#server/db/transaction.ts';

/** Readings of one stretch of time, or one reading; `at` in ms. */
export type ReadingBucket = {
  readonly at: number;
  readonly rpm: number;
  readonly rpmMin: number;
  readonly rpmMax: number;
  readonly watts: number;
  readonly wattsMin: number;
  readonly wattsMax: number;
  readonly closedInputs: number;
};

type Asked = { readonly pumpNumber: number; readonly from: number; readonly until: number };

/** Every reading of a pump in a window, at most `limit`. */
export async function listReadings(db: Transaction, asked: Asked, limit: number): Promise<ReadingBucket[]> {
  const { pumpNumber, from, until } = asked;
  const { rows } = await db.execute<ReadingBucket>(sql`
    select ${epochMs(sql`at`)} as at, rpm, rpm as "rpmMin", rpm as "rpmMax", watts, watts as "wattsMin",
      watts as "wattsMax", closed_inputs as "closedInputs"
    from readings where pump_number = ${pumpNumber} and at >= ${instantOfMs(from)} and at < ${instantOfMs(until)}
    order by readings.at limit ${limit}`);
  return rows;
}

/**
 * Readings of a pump in buckets of equal length counted from `from`, empty ones left out. The extremes are kept, so
 * that a start of a few seconds still shows in a month. `at` is where the bucket begins.
 */
export async function listReadingBuckets(db: Transaction, asked: Asked, bucketMs: number): Promise<ReadingBucket[]> {
  const { pumpNumber, from, until } = asked;
  const length = sql`${`${bucketMs} milliseconds`}::interval`;
  const { rows } = await db.execute<ReadingBucket>(sql`
    select ${epochMs(sql`bucket`)} as at,
      avg(rpm)::float4 as rpm, min(rpm) as "rpmMin", max(rpm) as "rpmMax",
      avg(watts)::float4 as watts, min(watts) as "wattsMin", max(watts) as "wattsMax", bit_or(closed_inputs) as "closedInputs"
    from (
      select date_bin(${length}, at, ${instantOfMs(from)}) as bucket, rpm, watts, closed_inputs
      from readings where pump_number = ${pumpNumber} and at >= ${instantOfMs(from)} and at < ${instantOfMs(until)}
    ) as placed
    group by bucket order by bucket`);
  return rows;
}
