import { sql } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Pools } from '#server/db/pools.ts';
import { asPerson, type Sight, type Transaction } from '#server/db/transaction.ts';
import { makeTestCompany } from '#tests/support/test-company.ts';
import { addAlarm, addHour, setState } from '#tests/support/test-history.ts';
import { openTestPools } from '#tests/support/test-pools.ts';

const DAY_MS = 86_400_000;
let pools: Pools;
beforeAll(async () => {
  pools = await openTestPools();
});

const see = <T>(sight: Sight, work: (db: Transaction) => Promise<T>) => asPerson(pools.app, sight, 'read', work);
const write = <T>(sight: Sight, work: (db: Transaction) => Promise<T>) => asPerson(pools.app, sight, 'write', work);

const countIn = (sight: Sight, table: string) =>
  see(sight, async (db) => {
    const { rows } = await db.execute<{ n: number }>(sql`select count(*)::int as n from ${sql.identifier(table)}`);
    return rows[0]?.n;
  });

const earliestIn = (sight: Sight, table: string, column: string) =>
  see(sight, async (db) => {
    const { rows } = await db.execute<{ at: string }>(
      sql`select min(${sql.identifier(column)})::text as at from ${sql.identifier(table)}`,
    );
    return new Date(rows[0]?.at ?? 0).getTime();
  });

describe('a change of owner', () => {
  it('hides the time before the new owner moved in, and everything from the one who left', async () => {
    const { companyId, manager, homeowner, neighbour, padIds, pumps } = await makeTestCompany(pools.machine, {
      pads: 1,
    });
    const { pumpId } = pumps[0]!;
    const now = Date.now();
    for (const daysAgo of [6, 4, 2]) {
      const from = new Date(now - daysAgo * DAY_MS);
      await addHour(pools.machine, pumpId, from);
      await addAlarm(pools.machine, pumpId, { from, state: daysAgo === 2 ? 'unacknowledged' : 'normal' });
    }
    await setState(pools.machine, pumpId, new Date(now));
    const moved = new Date(now - 3 * DAY_MS).toISOString();
    await write(manager.sight, async (db) => {
      await db.execute(sql`update pad_ownerships set ends_at = ${moved} where pad_id = ${padIds[0]}`);
      await db.execute(sql`insert into pad_ownerships (id, company_id, pad_id, customer_id, starts_at)
        values (gen_random_uuid(), ${companyId}, ${padIds[0]}, ${neighbour.sight.customerId}, ${moved})`);
    });
    for (const [table, column] of [
      ['runs', 'from_at'],
      ['alarms', 'from_at'],
      ['readings', 'at'],
    ] as const) {
      expect([table, await earliestIn(neighbour.sight, table, column)]).toEqual([table, now - 2 * DAY_MS]);
    }
    expect(await countIn(neighbour.sight, 'pump_states')).toBe(1);
    for (const table of ['pads', 'pumps', 'runs', 'readings', 'alarms', 'pump_states', 'pad_ownerships', 'devices']) {
      expect([table, await countIn(homeowner.sight, table)]).toEqual([table, 0]);
    }
  });

  it('hides a state that was last heard of before the new owner moved in', async () => {
    const { homeowner, manager, pumps } = await makeTestCompany(pools.machine);
    await setState(pools.machine, pumps[0]!.pumpId, new Date(Date.now() - DAY_MS));
    expect(await countIn(homeowner.sight, 'pump_states')).toBe(1);
    await write(manager.sight, (db) =>
      db.execute(sql`update pad_ownerships set starts_at = now() - interval '1 hour'`),
    );
    expect(await countIn(homeowner.sight, 'pump_states')).toBe(0);
  });

  it('cannot give a pad two owners at once', async () => {
    const { companyId, manager, neighbour, padIds } = await makeTestCompany(pools.machine);
    const overlap = write(manager.sight, (db) =>
      db.execute(sql`insert into pad_ownerships (id, company_id, pad_id, customer_id, starts_at)
        values (gen_random_uuid(), ${companyId}, ${padIds[0]}, ${neighbour.sight.customerId}, now())`),
    );
    await expect(overlap).rejects.toMatchObject({ cause: { constraint: 'pad_ownerships_one_owner' } });
  });
});
