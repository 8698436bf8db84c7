import pg from 'pg';
import { afterAll } from 'vitest';

/** Listens to the database's doorbell; the list grows as notices arrive, which is before the next query answers. */
export async function hearNotices(
  databaseUrl: string,
  channel: string,
): Promise<{ readonly heard: string[]; readonly catchUp: () => Promise<void> }> {
  const client = new pg.Client({ connectionString: databaseUrl });
  const heard: string[] = [];
  client.on('notification', ({ payload = '' }) => heard.push(payload));
  await client.connect();
  await client.query(`listen ${channel}`);
  afterAll(() => client.end());
  // PostgreSQL sends what was notified before it answers a query that began later.
  return { heard, catchUp: async () => void (await client.query('select 1')) };
}
