import { sql } from 'drizzle-orm';
import type { Transaction } from '#server/db/transaction.ts';

/**
 * The cursor of this snapshot: the oldest transaction that may still be at work. Whatever is not visible now was
 * written by it or a later one, so that asking again from here misses nothing, however late it commits.
 */
export async function findCursor(db: Transaction): Promise<string> {
  const { rows } = await db.execute<{ cursor: string }>(
    sql`select pg_snapshot_xmin(pg_current_snapshot())::text as cursor`,
  );
  return rows[0]?.cursor ?? '0';
}

/** Pumps whose state or alarms changed, at most `limit`. */
export async function listPumpIdsChangedSince(db: Transaction, cursor: string, limit: number): Promise<string[]> {
  const { rows } = await db.execute<{ id: string }>(sql`
    select pump_id as id from pump_states where changed_in >= ${cursor}::xid8
    union select pump_id from alarms where changed_in >= ${cursor}::xid8 and pump_id is not null
    limit ${limit}`);
  return rows.map(({ id }) => id);
}
