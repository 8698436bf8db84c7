import { afterAll } from 'vitest';
import { createPools, type Pools } from '#server/db/pools.ts';
import { createFreshDatabase, getWorkerDatabase } from '#tests/support/test-database.ts';

/** Pools of both roles into this worker's database, closed after the file's last test. */
export async function openTestPools(): Promise<Pools & { readonly superuserUrl: string }> {
  const { databaseUrl, superuserUrl } = await getWorkerDatabase();
  const pools = createPools(databaseUrl, { onError: () => undefined, sizes: { app: 4, machine: 4 } });
  afterAll(() => pools.end());
  return { ...pools, superuserUrl };
}

/** The same into a database of the file's own, dropped after its last test: for work that looks at every row. */
export async function openFreshPools(): Promise<Pools & { readonly superuserUrl: string }> {
  const { databaseUrl, superuserUrl, drop } = await createFreshDatabase();
  const pools = createPools(databaseUrl, { onError: () => undefined, sizes: { app: 4, machine: 4 } });
  afterAll(async () => {
    await pools.end();
    await drop();
  });
  return { ...pools, superuserUrl };
}
