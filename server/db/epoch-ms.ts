import { type SQL, sql } from 'drizzle-orm';

/** An instant column in a raw query as whole milliseconds since the Unix epoch: a JavaScript number, or null. */
export const epochMs = (column: SQL): SQL<number> => sql`round(extract(epoch from ${column}) * 1000)::float8`;

/** Milliseconds since the Unix epoch as an instant, in a raw query. */
export const instantOfMs = (ms: number): SQL => sql`${new Date(ms).toISOString()}::timestamptz`;
