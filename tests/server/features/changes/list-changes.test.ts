import { beforeAll, describe, expect, it } from 'vitest';
import type { Pools } from '#server/db/pools.ts';
import type { Changes } from '#shared/contract/http/changes.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { addAlarm, addHour, nowOf, setState } from '#tests/support/test-history.ts';
import { openTestPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestServer } from '#tests/support/test-server.ts';

let pools: Pools;
let server: TestServer;
let company: TestCompany;

beforeAll(async () => {
  pools = await openTestPools();
  server = await startTestServer(pools);
  company = await makeTestCompany(pools.machine, { pads: 3 });
});

const since = async (cursor: string): Promise<Changes> =>
  (await server.ask('GET', `/api/changes?since=${cursor}`, { as: company.manager })).body;
const nowCursor = async () => (await since('999999999999')).cursor;
/** A cursor after everything so far. A transaction of whoever else uses the same PostgreSQL may hold it back a while. */
const settledCursor = async (): Promise<string> => {
  let cursor = '';
  const countEarlier = async () => {
    cursor = await nowCursor();
    const { pumps, runs, alarms } = await since(cursor);
    return pumps.length + runs.length + alarms.length;
  };
  await expect.poll(countEarlier).toBe(0);
  return cursor;
};

describe('changes', () => {
  it('are what changed at or after the cursor, and nothing else', async () => {
    const [first, second, third] = company.pumps.map(({ pumpId }) => pumpId);
    await setState(pools.machine, first!, new Date());
    const cursor = await settledCursor();
    await setState(pools.machine, second!, new Date());
    await addHour(pools.machine, third!, new Date(Date.now() - 3_600_000));
    const { pumps, runs, alarms, complete } = await since(cursor);
    expect(complete).toBe(true);
    expect(pumps.map(({ pumpId }) => pumpId)).toEqual([second]);
    expect(runs).toEqual([{ pumpId: third, run: expect.objectContaining({ meanRpm: 1700 }) }]);
    expect(alarms).toEqual([]);
    expect((await since(await settledCursor())).pumps).toEqual([]);
  });

  it('bring an alarm that was acknowledged, and the row that bears its mark', async () => {
    const { pumpId } = company.pumps[0]!;
    const alarmId = await addAlarm(pools.machine, pumpId);
    const cursor = await settledCursor();
    const answer = await server.ask('POST', `/api/alarms/${alarmId}/acknowledgement`, {
      as: company.technician,
      body: {},
    });
    expect(answer.status).toBe(200);
    const { alarms, pumps } = await since(cursor);
    expect(alarms).toEqual([expect.objectContaining({ id: alarmId, state: 'acknowledged' })]);
    expect(pumps).toEqual([
      expect.objectContaining({ pumpId, alarm: expect.objectContaining({ id: alarmId, acknowledged: true }) }),
    ]);
  });

  it('miss no transaction that began early and committed late', async () => {
    const { pumpId } = company.pumps[1]!;
    await setState(pools.machine, pumpId, new Date());
    const slow = await pools.machine.connect();
    await slow.query('begin');
    await slow.query('update pump_states set now = $2 where pump_id = $1', [pumpId, nowOf(new Date(), { rpm: 1234 })]);
    // Others commit meanwhile, and a browser asks: the slow one is not visible yet.
    await setState(pools.machine, company.pumps[2]!.pumpId, new Date());
    const { cursor } = await since('1');
    await slow.query('commit');
    slow.release();
    const { pumps } = await since(cursor);
    expect(pumps.find((pump) => pump.pumpId === pumpId)?.now?.rpm).toBe(1234);
  });

  it('say so when they are too many to list', async () => {
    const { pumpId } = company.pumps[3]!;
    await pools.machine.query(
      `insert into runs (pump_id, company_id, from_at, to_at, covered_ms, watt_hours, expected_rpm, mean_rpm, mean_watts,
         closed_inputs, active_input, source, expected_source)
       select $1, $2, at, at + interval '1 minute', 1, 1, 1, 1, 1, 0, 0, 'program', 'program'
       from generate_series(now() - interval '4001 minutes', now(), interval '1 minute') at`,
      [pumpId, company.companyId],
    );
    const { complete, runs, cursor } = await since('1');
    expect([complete, runs]).toEqual([false, []]);
    expect(cursor).toMatch(/^\d+$/);
  });

  it('refuse a cursor that is none', async () => {
    const { status, body } = await server.ask('GET', '/api/changes?since=yesterday', { as: company.manager });
    expect([status, body.issues[0].path]).toEqual([400, 'query.since']);
  });
});
