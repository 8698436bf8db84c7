import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createFreshDatabase, getWorkerDatabase } from '#tests/support/test-database.ts';

/** Tables without a tenant key that nevertheless must be guarded; every other one must bear company_id. */
const WITHOUT_TENANT_KEY = ['companies', 'readings', 'sign_in_attempts', 'listening_periods'];

/** Tables the app role must not even be granted. */
const MACHINE_ONLY = ['refresh_tokens', 'sign_in_attempts', 'mail_states', 'listening_periods', 'area_states'];

const open = async (url: string) => {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  return client;
};

type Table = { name: string; partition: boolean; enabled: boolean; forced: boolean; tenant: boolean };

const listTables = async (client: pg.Client): Promise<Table[]> => {
  const { rows } = await client.query<Table>(`
    select c.relname as name, c.relispartition as partition, c.relrowsecurity as enabled, c.relforcerowsecurity as forced,
      exists (select from pg_attribute a where a.attrelid = c.oid and a.attname = 'company_id' and a.attnotnull) as tenant
    from pg_class c join pg_namespace n on n.oid = c.relnamespace
    where n.nspname = 'public' and c.relkind in ('r', 'p')`);
  return rows;
};

/** Names of the tables that are not guarded as every table must be. */
const listUnguarded = async (client: pg.Client): Promise<string[]> => {
  const { rows } = await client.query<{ tablename: string }>('select distinct tablename from pg_policies');
  const withPolicy = new Set(rows.map((row) => row.tablename));
  return (await listTables(client))
    .filter((table) => !(table.enabled && table.forced && (table.partition || withPolicy.has(table.name))))
    .map((table) => table.name);
};

describe('the catalogue', () => {
  let client: pg.Client;
  beforeAll(async () => {
    client = await open((await getWorkerDatabase()).superuserUrl);
  });
  afterAll(() => client.end());

  it('guards every table with forced row-level security and a policy', async () => {
    expect(await listUnguarded(client)).toEqual([]);
    expect((await listTables(client)).length).toBeGreaterThan(30);
  });

  it('names a table that somebody forgot to guard', async () => {
    const { superuserUrl, drop } = await createFreshDatabase();
    const fresh = await open(superuserUrl);
    await fresh.query('create table forgotten (company_id uuid not null)');
    await fresh.query('create table half_guarded (company_id uuid not null)');
    await fresh.query('alter table half_guarded enable row level security');
    expect((await listUnguarded(fresh)).sort()).toEqual(['forgotten', 'half_guarded']);
    await fresh.end();
    await drop();
  });

  it('finds the tenant key, never null, in every table that is not on the list', async () => {
    const without = (await listTables(client)).filter((table) => !table.tenant && !table.partition);
    expect(without.map((table) => table.name).sort()).toEqual([...WITHOUT_TENANT_KEY].sort());
  });

  it('compares the tenant in every policy of the app role', async () => {
    const { rows } = await client.query<{ policyname: string; rule: string }>(`
      select policyname, coalesce(qual, '') || ' ' || coalesce(with_check, '') as rule from pg_policies
      where 'millrace_app' = any(roles) and tablename <> 'readings'`);
    expect(rows.length).toBeGreaterThan(60);
    expect(rows.filter(({ rule }) => !rule.includes('millrace_company()')).map((row) => row.policyname)).toEqual([]);
  });

  it('gives policies to the two roles alone, so that the owner sees no row', async () => {
    const { rows } = await client.query<{ role: string }>('select distinct unnest(roles) as role from pg_policies');
    expect(rows.map(({ role }) => role).sort()).toEqual(['millrace_app', 'millrace_machine']);
  });

  it('keeps tables of credentials, partitions and secret columns from the app role altogether', async () => {
    const { rows } = await client.query<{ name: string }>(`
      select c.relname as name from pg_class c where c.relkind in ('r', 'p') and c.relnamespace = 'public'::regnamespace
      and has_any_column_privilege('millrace_app', c.oid, 'select, insert, update')`);
    const granted = rows.map(({ name }) => name);
    expect(MACHINE_ONLY.filter((name) => granted.includes(name))).toEqual([]);
    expect(granted.filter((name) => /^readings_\d/.test(name))).toEqual([]);
    const columns = await client.query(`
      select has_column_privilege('millrace_app', 'users', 'password_hash', 'select') as password,
        has_column_privilege('millrace_app', 'devices', 'secret_hash', 'select') as secret`);
    expect(columns.rows).toEqual([{ password: false, secret: false }]);
  });

  it('lets neither role bypass row-level security, make roles or databases, or act as the owner', async () => {
    const { rows } = await client.query(`
      select rolname, rolsuper, rolbypassrls, rolcreaterole, rolcreatedb,
        pg_has_role(rolname, 'millrace_owner', 'member') as owner
      from pg_roles where rolname in ('millrace_app', 'millrace_machine') order by 1`);
    const harmless = { rolsuper: false, rolbypassrls: false, rolcreaterole: false, rolcreatedb: false, owner: false };
    expect(rows).toEqual([
      { rolname: 'millrace_app', ...harmless },
      { rolname: 'millrace_machine', ...harmless },
    ]);
  });
});
