import { sql } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Pools } from '#server/db/pools.ts';
import { asPerson, type Sight, type Transaction } from '#server/db/transaction.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { addAlarm, addDeviceTraces, addHour, setState } from '#tests/support/test-history.ts';
import { openTestPools } from '#tests/support/test-pools.ts';

let pools: Pools;
let ours: TestCompany;
let theirs: TestCompany;

const fill = async (company: TestCompany) => {
  const at = new Date();
  for (const { pumpId, deviceId } of company.pumps) {
    await addAlarm(pools.machine, pumpId, { from: at });
    await setState(pools.machine, pumpId, at);
    await addHour(pools.machine, pumpId, new Date(at.getTime() - 2 * 3_600_000));
    await addDeviceTraces(pools.machine, pumpId, deviceId, at);
  }
};

beforeAll(async () => {
  pools = await openTestPools();
  [ours, theirs] = [await makeTestCompany(pools.machine), await makeTestCompany(pools.machine)];
  await fill(ours);
  await fill(theirs);
});

const see = <T>(sight: Sight, work: (db: Transaction) => Promise<T>) => asPerson(pools.app, sight, 'read', work);
const write = <T>(sight: Sight, work: (db: Transaction) => Promise<T>) => asPerson(pools.app, sight, 'write', work);

const countIn = (sight: Sight, table: string) =>
  see(sight, async (db) => {
    const { rows } = await db.execute<{ n: number }>(sql`select count(*)::int as n from ${sql.identifier(table)}`);
    return rows[0]?.n;
  });

const idsIn = (sight: Sight, text: string) =>
  see(sight, async (db) => (await db.execute<{ id: string }>(sql.raw(text))).rows.map(({ id }) => id).sort());

/** Every table that the app role may read anything of, with the column that names a row's company. */
const listReadable = async () => {
  const { rows } = await pools.machine.query<{ name: string; tenant: string }>(`
    select c.relname as name, case c.relname when 'companies' then 'id' else 'company_id' end as tenant
    from pg_class c where c.relnamespace = 'public'::regnamespace and c.relkind in ('r', 'p') and not c.relispartition
    and has_any_column_privilege('millrace_app', c.oid, 'select') and c.relname <> 'readings'`);
  return rows;
};

describe('a person of one company', () => {
  it('sees no row of another company in any table, whatever they ask', async () => {
    const tables = await listReadable();
    expect(tables.length).toBeGreaterThan(20);
    for (const { sight } of [theirs.manager, theirs.technician, theirs.homeowner]) {
      for (const { name, tenant } of tables) {
        const seen = await see(sight, async (db) => {
          const { rows } = await db.execute<{ company: string }>(
            sql`select distinct ${sql.identifier(tenant)} as company from ${sql.identifier(name)}`,
          );
          return rows.map(({ company }) => company);
        });
        expect([name, seen.filter((company) => company !== theirs.companyId)]).toEqual([name, []]);
      }
    }
  });

  it('sees no reading of another company, by number or by scan', async () => {
    const numbers = await pools.machine.query('select number from pumps where company_id = $1', [ours.companyId]);
    for (const { sight } of [theirs.manager, theirs.technician, theirs.homeowner]) {
      const seen = await see(
        sight,
        async (db) => (await db.execute(sql`select distinct pump_number from readings`)).rows,
      );
      expect(seen.length).toBeGreaterThan(0);
      expect(seen.filter((row) => numbers.rows.some(({ number }) => number === row.pump_number))).toEqual([]);
    }
  });

  it('cannot write into another company, nor move a row of theirs there', async () => {
    const insert = write(theirs.manager.sight, (db) =>
      db.execute(
        sql`insert into customers (id, company_id, name) values (gen_random_uuid(), ${ours.companyId}, 'Stolen')`,
      ),
    );
    await expect(insert).rejects.toMatchObject({ cause: { message: expect.stringMatching(/row-level security/) } });
    const move = write(theirs.manager.sight, (db) => db.execute(sql`update pads set company_id = ${ours.companyId}`));
    await expect(move).rejects.toMatchObject({
      cause: { message: expect.stringMatching(/row-level security|foreign key/) },
    });
    const changed = await write(theirs.manager.sight, (db) =>
      db.execute(sql`update pads set name = 'Stolen' where id = any(${sql.param(ours.padIds)}::uuid[])`),
    );
    expect(changed.rowCount).toBe(0);
  });

  it('cannot hang their pump on a pad of another company', async () => {
    const insert = write(theirs.manager.sight, (db) =>
      db.execute(sql`insert into pumps (id, company_id, pad_id, name, settings)
        values (gen_random_uuid(), ${theirs.companyId}, ${ours.padIds[0]}, 'Pump', '{}')`),
    );
    await expect(insert).rejects.toMatchObject({ cause: { constraint: 'pumps_pad_fkey' } });
  });
});

describe('nobody in particular', () => {
  it('sees nothing: without a person set, every table is empty', async () => {
    const client = await pools.app.connect();
    for (const { name } of await listReadable()) {
      const { rows } = await client.query(`select count(*)::int as n from ${name}`);
      expect([name, rows[0].n]).toEqual([name, 0]);
    }
    expect((await client.query('select count(*)::int as n from readings')).rows).toEqual([{ n: 0 }]);
    client.release();
  });

  it('is what a connection belongs to again after the transaction of a person', async () => {
    await see(ours.manager.sight, async (db) => db.execute(sql`select from pumps`));
    const client = await pools.app.connect();
    expect((await client.query("select current_setting('millrace.company', true) as c")).rows[0].c || null).toBeNull();
    client.release();
  });
});

describe('the owner of the schema', () => {
  it('sees no row either', async () => {
    const { databaseUrl } = await import('#tests/support/test-database.ts').then((module) =>
      module.getWorkerDatabase(),
    );
    const { default: pg } = await import('pg');
    const owner = new pg.Client({ connectionString: databaseUrl });
    await owner.connect();
    expect((await owner.query('select count(*)::int as n from pumps')).rows).toEqual([{ n: 0 }]);
    await owner.end();
  });
});

describe('a homeowner', () => {
  const own = () =>
    ours.pumps
      .slice(0, 2)
      .map(({ pumpId }) => pumpId)
      .sort();

  it("sees their own pads, pumps, runs, readings, alarms and devices, and no neighbour's", async () => {
    const { sight } = ours.homeowner;
    expect(await idsIn(sight, 'select id from pads')).toEqual([ours.padIds[0]]);
    for (const query of [
      'select id from pumps',
      'select pump_id as id from pump_states',
      'select distinct pump_id as id from runs',
      'select distinct pump_id as id from alarms',
      'select pump_id as id from device_fittings',
      'select pump_id as id from motor_fittings',
      'select distinct pump_id as id from inputs',
    ]) {
      expect([query, await idsIn(sight, query)]).toEqual([query, own()]);
    }
    expect(await countIn(sight, 'readings')).toBe(120);
    expect(await countIn(sight, 'devices').catch(() => 'refused')).toBe(2);
    expect(await countIn(sight, 'alarm_transitions')).toBe(2);
    expect(await countIn(sight, 'customers')).toBe(1);
  });

  it('sees no mail, audit trail, refusal or device message, and of people only themselves and their technician', async () => {
    const { sight } = ours.homeowner;
    for (const table of ['outbox_mails', 'audit_entries', 'refused_messages', 'device_events']) {
      expect([table, await countIn(sight, table)]).toEqual([table, 0]);
    }
    expect(await idsIn(sight, 'select id from users')).toEqual([ours.homeowner.userId, ours.technician.userId].sort());
  });

  it('changes nothing but their own preferences', async () => {
    const { sight, userId } = ours.homeowner;
    const updates = [
      sql`update pads set name = 'Mine'`,
      sql`update pumps set name = 'Mine'`,
      sql`update alarms set acknowledgement_note = 'Mine'`,
      sql`delete from devices`,
    ];
    for (const update of updates) {
      expect((await write(sight, (db) => db.execute(update))).rowCount).toBe(0);
    }
    const { rows } = await write(sight, (db) =>
      db.execute(sql`update users set preferences = '{"units":"si"}' returning id`),
    );
    expect(rows).toEqual([{ id: userId }]);
    await expect(write(sight, (db) => db.execute(sql`update users set role = 'manager'`))).rejects.toMatchObject({
      cause: { message: expect.stringMatching(/permission denied/) },
    });
  });
});

describe('a technician', () => {
  it("sees the company's pads and alarms, and commissions nothing", async () => {
    const { sight } = ours.technician;
    expect(await countIn(sight, 'pumps')).toBe(3);
    expect(await countIn(sight, 'audit_entries')).toBe(0);
    expect((await write(sight, (db) => db.execute(sql`update pumps set name = 'Mine'`))).rowCount).toBe(0);
    const insert = write(sight, (db) =>
      db.execute(
        sql`insert into customers (id, company_id, name) values (gen_random_uuid(), ${ours.companyId}, 'New')`,
      ),
    );
    await expect(insert).rejects.toMatchObject({ cause: { message: expect.stringMatching(/row-level security/) } });
  });
});

describe('reading', () => {
  it('happens in a transaction that cannot write, even for a manager', async () => {
    const update = see(ours.manager.sight, (db) => db.execute(sql`update pumps set name = 'x'`));
    await expect(update).rejects.toMatchObject({ cause: { message: expect.stringMatching(/read-only/) } });
  });
});
