import { fileURLToPath } from 'node:url';
import { readMigrationFiles } from 'drizzle-orm/migrator';
import { drizzle } from 'drizzle-orm/node-postgres';
import { migrate } from 'drizzle-orm/node-postgres/migrator';
import pg from 'pg';
import { ensureDatabaseRoles } from './database-roles.ts';
import { makeReadingPartitions } from './reading-partitions.ts';

const MIGRATIONS_FOLDER = fileURLToPath(new URL('../../drizzle', import.meta.url));

type Options = { readonly databaseUrl: string; readonly onProgress?: ((text: string) => void) | undefined };

/**
 * Brings a database up to date: roles, then every step it lacks, all of them or none, then partitions for readings.
 * Several servers may start at once: an advisory lock lets one work while the others wait.
 */
export async function migrateDatabase({ databaseUrl, onProgress = () => undefined }: Options): Promise<void> {
  const client = new pg.Client({ connectionString: databaseUrl, application_name: 'millrace migrations' });
  await client.connect();
  try {
    await client.query("select pg_advisory_lock(hashtext('millrace migrations'))");
    const missing = await countMissingSteps(client);
    onProgress(missing === 0 ? 'The database is up to date' : `Bringing the database up to date (${missing} steps)`);
    await ensureDatabaseRoles(client, databaseUrl);
    await migrate(drizzle(client), { migrationsFolder: MIGRATIONS_FOLDER });
    await makeReadingPartitions(client);
  } finally {
    await client.end();
  }
}

/** How many steps the database lacks; refuses one that has steps this version does not know. */
async function countMissingSteps(client: pg.Client): Promise<number> {
  const steps = readMigrationFiles({ migrationsFolder: MIGRATIONS_FOLDER });
  const journal = await client.query<{ exists: boolean }>(
    "select to_regclass('drizzle.__drizzle_migrations') is not null as exists",
  );
  if (!journal.rows[0]?.exists) return steps.length;
  const { rows } = await client.query<{ hash: string; created_at: string }>(
    'select hash, created_at from drizzle.__drizzle_migrations order by created_at',
  );
  const known = new Map(steps.map((step) => [step.folderMillis, step.hash]));
  if (rows.some((row) => !known.has(Number(row.created_at)))) throw new Error(NEWER);
  if (rows.some((row) => known.get(Number(row.created_at)) !== row.hash)) throw new Error(OTHER);
  return steps.length - rows.length;
}

const REMEDY =
  'start the version that last used it, restore a copy of the database from before, or, for the demo, type: npm run reset';
const NEWER = `This database was used by a newer Millrace, and going back would lose what that one added. Remedy: ${REMEDY}`;
const OTHER = `This database was made by another build of Millrace: a step of its schema differs. Remedy: ${REMEDY}`;
