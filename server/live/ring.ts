import type pg from 'pg';
import type { Channel } from './doorbell.ts';

/** PostgreSQL takes 7999 bytes; an id is 36 characters and a comma. */
const IDS_A_RING = 200;

/** Rings for these pumps (null = for what has no pump of its own), from outside the transaction that changed them: a NOTIFY inside would queue commits. */
export async function ringForPumps(
  pool: pg.Pool,
  channel: Channel,
  pumpIds: readonly (string | null)[],
): Promise<void> {
  const named = pumpIds.filter((pumpId) => pumpId !== null);
  const payloads = named.length < pumpIds.length ? [''] : [];
  for (let from = 0; from < named.length; from += IDS_A_RING) {
    payloads.push(named.slice(from, from + IDS_A_RING).join(','));
  }
  if (payloads.length === 0) return;
  await pool.query({
    name: 'ring',
    text: 'select pg_notify($1, payload) from unnest($2::text[]) as payload',
    values: [channel, payloads],
  });
}

/** Rings without saying for what. */
export async function ring(pool: pg.Pool, channel: Channel): Promise<void> {
  await pool.query({ name: 'ring-plain', text: `select pg_notify($1, '')`, values: [channel] });
}
