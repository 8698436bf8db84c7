import type pg from 'pg';

type Database = Pick<pg.Pool, 'query'>;

/** What is kept of each device's refusals: enough for whoever stands at the pad to see what is wrong. */
export const REFUSALS_KEPT = 200;

/** What no longer serves anybody, with how long it is kept. Each statement is small enough to run every few minutes. */
const STATEMENTS = {
  'refresh tokens': `delete from refresh_tokens where expires_at < now() - interval '1 day'`,
  'idempotency keys': `delete from idempotency_keys where created_at < now() - interval '1 day'`,
  'sign-in attempts': `delete from sign_in_attempts where expire < extract(epoch from now()) * 1000`,
  'listening periods': `delete from listening_periods where alive_at < now() - interval '60 days'`,
  // Its outcomes go with it.
  backtests: `delete from backtests where ended_at < now() - interval '30 days'`,
  refusals: `delete from refused_messages r using (
      select device_id, (array_agg(id order by id desc))[${REFUSALS_KEPT}] as oldest_kept
      from refused_messages group by device_id having count(*) > ${REFUSALS_KEPT}) many
    where r.device_id = many.device_id and r.id < many.oldest_kept`,
} as const;

/** Deletes all of it; answers how many rows went, by what they were. */
export async function cleanUp(database: Database): Promise<Record<string, number>> {
  const counts: Record<string, number> = {};
  for (const [name, statement] of Object.entries(STATEMENTS)) {
    const { rowCount } = await database.query(statement);
    if (rowCount !== null && rowCount > 0) counts[name] = rowCount;
  }
  return counts;
}
