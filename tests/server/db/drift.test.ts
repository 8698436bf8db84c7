import { execFile } from 'node:child_process';
import { cp, mkdtemp, readdir, rm, symlink, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { promisify } from 'node:util';
import { is } from 'drizzle-orm';
import { getTableConfig, PgTable } from 'drizzle-orm/pg-core';
import pg from 'pg';
import { describe, expect, it } from 'vitest';
import { getWorkerDatabase } from '#tests/support/test-database.ts';

const project = fileURLToPath(new URL('../../..', import.meta.url));
const schemaFolder = join(project, 'server/db/schema');

const listDeclaredColumns = async (): Promise<string[]> => {
  const files = await readdir(schemaFolder);
  const modules = await Promise.all(files.map((file) => import(/* @vite-ignore */ join(schemaFolder, file))));
  const tables = modules.flatMap((module) => Object.values(module)).filter((value) => is(value, PgTable));
  return tables.flatMap((table) => {
    const { name, columns } = getTableConfig(table);
    return columns.map(
      (column) => `${name}.${column.name} ${normalise(column.getSQLType())}${column.notNull ? ' not null' : ''}`,
    );
  });
};

const normalise = (type: string) =>
  type.replace('timestamp with time zone', 'timestamptz').replace('varchar', 'character varying');

const listStoredColumns = async (client: pg.Client): Promise<string[]> => {
  const { rows } = await client.query<{ text: string }>(`
    select c.relname || '.' || a.attname || ' ' || format_type(a.atttypid, a.atttypmod)
      || case when a.attnotnull then ' not null' else '' end as text
    from pg_class c join pg_attribute a on a.attrelid = c.oid
    where c.relnamespace = 'public'::regnamespace and c.relkind in ('r', 'p') and not c.relispartition
      and a.attnum > 0 and not a.attisdropped`);
  return rows.map(({ text }) => normalise(text));
};

describe('the schema', () => {
  it('is what the migrations make, column by column', async () => {
    const client = new pg.Client({ connectionString: (await getWorkerDatabase()).superuserUrl });
    await client.connect();
    const stored = await listStoredColumns(client);
    await client.end();
    expect(stored.sort()).toEqual((await listDeclaredColumns()).sort());
  });

  it('leaves the generator nothing to write', async () => {
    // On a copy, so that a drift is reported and not written into the project.
    const folder = await mkdtemp(join(tmpdir(), 'millrace-drift-'));
    await cp(join(project, 'drizzle'), join(folder, 'drizzle'), { recursive: true });
    for (const name of ['server', 'shared', 'node_modules', 'package.json'])
      await symlink(join(project, name), join(folder, name));
    await writeFile(
      join(folder, 'drizzle.config.ts'),
      "export default { dialect: 'postgresql', schema: './server/db/schema', out: './drizzle' };",
    );
    const before = await readdir(join(folder, 'drizzle'));
    const { stdout } = await promisify(execFile)(
      process.execPath,
      [join(project, 'node_modules/drizzle-kit/bin.cjs'), 'generate', '--name=drift'],
      { cwd: folder },
    );
    expect(stdout).toContain('No schema changes');
    expect(await readdir(join(folder, 'drizzle'))).toEqual(before);
    await rm(folder, { recursive: true });
  }, 60_000);
});
