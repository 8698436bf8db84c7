import type pg from 'pg';
import { newId } from '#server/db/new-id.ts';

type Database = Pick<pg.Pool, 'query'>;

/** Notes that the server listens from now on; answers the period's id. */
export async function beginListening(database: Database, now: number): Promise<string> {
  const id = newId(now);
  const at = new Date(now);
  await database.query('insert into listening_periods (id, started_at, alive_at) values ($1, $2, $2)', [id, at]);
  return id;
}

/** Notes that it still does. */
export async function stillListening(database: Database, periodId: string, now: number): Promise<void> {
  await database.query('update listening_periods set alive_at = $2 where id = $1', [periodId, new Date(now)]);
}
