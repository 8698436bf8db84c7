import { randomUUID } from 'node:crypto';
import pg from 'pg';
import { hashPassword } from '#server/features/session/index.ts';
import type { BenchDatabase } from './bench-database.ts';

export const BENCH_MANAGER = { email: 'manager@bench.example', password: 'a password of the bench' };

/** A manager of the one company of a bench's database, who can sign in. */
export async function addBenchManager({ superuserUrl }: BenchDatabase): Promise<void> {
  const client = new pg.Client({ connectionString: superuserUrl });
  await client.connect();
  try {
    await client.query(
      `insert into users (id, company_id, email, name, role, password_hash)
       select $1, id, $2, 'Manager', 'manager', $3 from companies`,
      [randomUUID(), BENCH_MANAGER.email, await hashPassword(BENCH_MANAGER.password)],
    );
  } finally {
    await client.end();
  }
}
