import type pg from 'pg';
import { describe, expect, it } from 'vitest';
import { createPools } from '#server/db/pools.ts';
import { dropOldReadingPartitions, makeReadingPartitions, RAW_RETENTION_DAYS } from '#server/db/reading-partitions.ts';
import { makeTestCompany } from '#tests/support/test-company.ts';
import { createFreshDatabase } from '#tests/support/test-database.ts';

const open = async () => {
  const database = await createFreshDatabase();
  const pools = createPools(database.databaseUrl, { onError: () => undefined });
  return {
    ...pools,
    close: async () => {
      await pools.end();
      await database.drop();
    },
  };
};

const store = (machine: pg.Pool, number: number, at: string) =>
  machine.query(
    `insert into readings (at, received_at, pump_number, rpm, watts, closed_inputs, active_input)
     values (${at}, now(), $1, 1700, 400, 0, 0) on conflict do nothing`,
    [number],
  );

describe('partitions of readings', () => {
  it('take readings of every day that is kept and of the coming week, once each', async () => {
    const { machine, close } = await open();
    const { pumps } = await makeTestCompany(machine);
    const { rows } = await machine.query('select number from pumps where id = $1', [pumps[0]!.pumpId]);
    for (const at of ['now()', "now() + interval '7 days'", `now() - interval '${RAW_RETENTION_DAYS} days'`]) {
      expect((await store(machine, rows[0].number, at)).rowCount).toBe(1);
    }
    const again = await store(machine, rows[0].number, '(select min(at) from readings)');
    expect(again.rowCount).toBe(0);
    await expect(store(machine, rows[0].number, "now() - interval '90 days'")).rejects.toThrow(/no partition/);
    await close();
  });

  it('are made ahead by the machine role, and those too old are dropped with what they hold', async () => {
    const { app, machine, close } = await open();
    expect(await makeReadingPartitions(machine)).toBe(0);
    const asked =
      "select millrace_make_reading_partitions((now() - interval '70 days')::date, (now() + interval '20 days')::date) as made";
    expect((await machine.query(asked)).rows[0].made).toBeGreaterThan(15);
    await store(machine, 1, "now() - interval '65 days'");
    expect(await dropOldReadingPartitions(machine)).toBeGreaterThan(7);
    expect((await machine.query('select from readings')).rowCount).toBe(0);
    expect(await dropOldReadingPartitions(machine)).toBe(0);
    await expect(app.query(asked)).rejects.toThrow(/permission denied/);
    await close();
  });

  it('number readings in the order of their arrival', async () => {
    const { machine, close } = await open();
    await store(machine, 1, "now() - interval '1 minute'");
    await store(machine, 1, "now() - interval '2 minutes'");
    const { rows } = await machine.query('select sequence from readings order by at');
    expect(Number(rows[0].sequence)).toBeGreaterThan(Number(rows[1].sequence));
    await close();
  });
});
