import type pg from 'pg';

/** Raw readings are kept this many days; older ones are refused as `too-old`. */
export const RAW_RETENTION_DAYS = 60;

/** Partitions are made this many days ahead, so that a machine left alone for a week goes on. */
const DAYS_AHEAD = 7;

type Queryable = Pick<pg.ClientBase, 'query'>;

/** Makes the daily partitions that readings of today, of every day still kept and of the coming days fall into. */
export async function makeReadingPartitions(database: Queryable): Promise<number> {
  const { rows } = await database.query<{ made: number }>(
    `select millrace_make_reading_partitions(today - $1::int, today + $2::int) as made
     from (select (now() at time zone 'UTC')::date as today) as utc`,
    [RAW_RETENTION_DAYS + 1, DAYS_AHEAD],
  );
  return rows[0]?.made ?? 0;
}

/** Drops the partitions of days that are no longer kept. */
export async function dropOldReadingPartitions(database: Queryable): Promise<number> {
  const { rows } = await database.query<{ dropped: number }>(
    `select millrace_drop_reading_partitions((now() at time zone 'UTC')::date - $1::int) as dropped`,
    [RAW_RETENTION_DAYS + 1],
  );
  return rows[0]?.dropped ?? 0;
}
