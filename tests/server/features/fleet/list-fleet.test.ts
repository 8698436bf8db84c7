import fc from 'fast-check';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Pools } from '#server/db/pools.ts';
import type { FleetPage, PumpRow } from '#shared/contract/http/pumps.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { addAlarm, setState } from '#tests/support/test-history.ts';
import { openTestPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestServer } from '#tests/support/test-server.ts';

let pools: Pools;
let server: TestServer;
let company: TestCompany;
/** Pumps of the company: A1, A2 (booster), B, C, D, E, F, G: one of each kind of day. */
let pump: Record<'urgent' | 'booster' | 'soon' | 'seen' | 'silent' | 'fast' | 'input' | 'unheard', string>;

beforeAll(async () => {
  pools = await openTestPools();
  server = await startTestServer(pools);
  company = await makeTestCompany(pools.machine, { pads: 7 });
  const [urgent, booster, soon, seen, silent, fast, input, unheard] = company.pumps.map(({ pumpId }) => pumpId);
  pump = {
    urgent: urgent!,
    booster: booster!,
    soon: soon!,
    seen: seen!,
    silent: silent!,
    fast: fast!,
    input: input!,
    unheard: unheard!,
  };
  const ago = (minutes: number) => new Date(server.clock.now - minutes * 60_000);
  await setState(pools.machine, pump.urgent, ago(1), {
    rpm: 3450,
    expectedRpm: 3450,
    source: 'prime',
    primed: false,
    watts: 900,
  });
  await setState(pools.machine, pump.booster, ago(2), { rpm: 0, expectedRpm: 0, source: 'off', watts: 5 });
  await setState(pools.machine, pump.soon, ago(3), { rpm: 2400, expectedRpm: 2850, watts: 700 });
  // It stands although a speed is due: neither running nor idle as planned.
  await setState(pools.machine, pump.seen, ago(4), { rpm: 0, watts: 6 });
  await setState(pools.machine, pump.silent, ago(90));
  await setState(pools.machine, pump.fast, ago(5), { rpm: 2900, expectedRpm: 2900, watts: 1500 });
  await setState(pools.machine, pump.input, ago(6), {
    rpm: 2850,
    expectedRpm: 2850,
    source: 'input',
    activeInput: 1,
    closedInputs: 1,
    watts: 1200,
  });
  await pools.machine.query('update pump_states set silent_since = now() where pump_id = $1', [pump.silent]);
  await addAlarm(pools.machine, pump.urgent, { from: ago(1) });
  await addAlarm(pools.machine, pump.urgent, { from: ago(9), detector: 'wrong-speed', priority: 'soon' });
  await addAlarm(pools.machine, pump.soon, { from: ago(3), detector: 'wrong-speed', priority: 'soon' });
  await addAlarm(pools.machine, pump.seen, {
    from: ago(3),
    detector: 'stopped',
    priority: 'soon',
    state: 'acknowledged',
  });
  await addAlarm(pools.machine, pump.fast, { from: ago(60), state: 'normal' });
});

const list = async (query = ''): Promise<FleetPage> => {
  const { status, body } = await server.ask('GET', `/api/pumps${query}`, { as: company.manager });
  expect([query, status]).toEqual([query, 200]);
  return body;
};
const idsOf = ({ items }: { items: PumpRow[] }) => items.map(({ pumpId }) => pumpId);

describe('the fleet', () => {
  it('shows the worst first: urgent, soon nobody has seen, soon that somebody has, then by name', async () => {
    const order = [pump.urgent, pump.soon, pump.seen, pump.booster];
    expect(idsOf(await list()).slice(0, 4)).toEqual(order);
  });

  it('marks a row with its worst alarm and how many are open', async () => {
    const [row] = (await list()).items;
    expect(row?.alarm).toMatchObject({
      detector: 'failed-prime',
      priority: 'urgent',
      acknowledged: false,
      open: 2,
      evidence: { primeWatts: 310 },
    });
    expect((await list()).items.find(({ pumpId }) => pumpId === pump.fast)?.alarm).toBeNull();
  });

  it('asks nobody to have seen a note: it waits for a stop', async () => {
    const id = await addAlarm(pools.machine, pump.unheard, {
      detector: 'motor-clock',
      priority: 'note',
      alarmClass: 'note',
    });
    const mark = (await list()).items.find(({ pumpId }) => pumpId === pump.unheard)?.alarm;
    expect(mark).toMatchObject({ id, acknowledged: true });
    await pools.machine.query(`update alarms set state = 'normal' where id = $1`, [id]);
  });

  it('leaves shelved, suppressed and out-of-service alarms off the row', async () => {
    const id = await addAlarm(pools.machine, pump.unheard, { detector: 'freezing' });
    const markOf = async () => (await list()).items.find(({ pumpId }) => pumpId === pump.unheard)?.alarm?.id;
    expect(await markOf()).toBe(id);
    for (const aside of ["shelved_until = now() + interval '1 hour'", 'suppressed = true', 'out_of_service = true']) {
      await pools.machine.query(
        `update alarms set shelved_until = null, suppressed = false, out_of_service = false where id = $1`,
        [id],
      );
      await pools.machine.query(`update alarms set ${aside} where id = $1`, [id]);
      expect([aside, await markOf()]).toEqual([aside, undefined]);
    }
  });

  it('counts everything that search and area keep, whatever the filter', async () => {
    const totals = { pumps: 8, running: 4, idle: 1, silent: 1, urgent: 1, soon: 2, note: 0 };
    expect((await list()).totals).toEqual(totals);
    const filtered = await list('?filter=silent&priority=urgent');
    expect([filtered.totals, filtered.matching, filtered.items]).toEqual([totals, 0, []]);
  });

  it('filters', async () => {
    const found = async (query: string) => idsOf(await list(query)).sort();
    expect(await found('?filter=running')).toEqual([pump.urgent, pump.soon, pump.fast, pump.input].sort());
    expect(await found('?filter=on-input')).toEqual([pump.input]);
    expect(await found('?filter=prime-trouble')).toEqual([pump.urgent]);
    expect(await found('?filter=off-expected')).toEqual([pump.soon, pump.seen].sort());
    expect(await found('?filter=silent')).toEqual([pump.silent]);
    expect(await found('?filter=alarm')).toEqual([pump.urgent, pump.soon, pump.seen].sort());
    expect(await found('?priority=soon')).toEqual([pump.soon, pump.seen].sort());
  });

  it('sorts by name as people do, by speed and watts from the top, and by who has not been heard for longest', async () => {
    const names = (await list('?sort=name')).items.map(({ padName, pumpName }) => `${padName[4]} ${pumpName}`);
    expect(names).toEqual([
      'A Booster',
      'A Filter pump',
      'B Filter pump',
      'C Filter pump',
      'D Filter pump',
      'E Filter pump',
      'F Filter pump',
      'G Filter pump',
    ]);
    expect(idsOf(await list('?sort=rpm')).slice(0, 3)).toEqual([pump.urgent, pump.fast, pump.input]);
    expect(idsOf(await list('?sort=watts')).slice(0, 3)).toEqual([pump.fast, pump.input, pump.urgent]);
    const heard = idsOf(await list('?sort=heard'));
    expect([heard[0], heard.at(-1)]).toEqual([pump.silent, pump.unheard]);
  });

  it('sorts "Pad 4" before "Pad 12"', async () => {
    const other = await makeTestCompany(pools.machine, { pads: 3 });
    const names = ['Pad 12', 'Pad 4', 'pad 9'];
    for (const [index, name] of names.entries()) {
      await pools.machine.query('update pads set name = $2 where id = $1', [other.padIds[index], name]);
    }
    const { body } = await server.ask('GET', '/api/pumps?sort=name', { as: other.manager });
    expect([...new Set(body.items.map((row: PumpRow) => row.padName))]).toEqual(['Pad 4', 'pad 9', 'Pad 12']);
  });

  it("searches pads, pumps, customers and serials, in any case, with no wildcard of the searcher's", async () => {
    const found = async (text: string) => idsOf(await list(`?q=${encodeURIComponent(text)}`));
    expect(await found('booster')).toEqual([pump.booster]);
    expect((await found('CUSTOMER OWNER')).sort()).toEqual([pump.urgent, pump.booster].sort());
    expect(await found(company.pumps[5]!.serial.toLowerCase())).toEqual([pump.fast]);
    expect(await found('testham')).toHaveLength(8);
    for (const text of ['%', '_', '\\', "'", 'nothing like it']) expect([text, await found(text)]).toEqual([text, []]);
  });

  it('keeps to an area and names all of them', async () => {
    const south = await list('?area=South');
    expect(south.items.every(({ area }) => area === 'South')).toBe(true);
    expect([south.matching, south.totals.pumps, south.areas]).toEqual([3, 3, ['North', 'South']]);
  });

  it("gives a row everything its strip needs, in the contract's shapes", async () => {
    const row = (await list()).items.find(({ pumpId }) => pumpId === pump.input);
    expect(row).toMatchObject({
      now: { source: 'input', activeInput: 1, until: null, lockedBy: null, primed: true },
      settings: { inputs: [2850, 2400, null], prime: { rpm: 3450, seconds: 60 } },
      traits: { inputCount: 3 },
      inputs: [{ number: 1, kind: 'clock', drives: 'cleaner', windows: [{ onMinute: 540, opensEarlyMinutes: 20 }] }],
      motorModel: 'Three inputs',
      intervalSeconds: 10,
      padState: 'open',
    });
  });

  it('leaves unmonitored pumps to the pages of their pads', async () => {
    const other = await makeTestCompany(pools.machine);
    await pools.machine.query('update pumps set monitored = false where id = $1', [other.pumps[1]!.pumpId]);
    const { body } = await server.ask('GET', '/api/pumps', { as: other.manager });
    expect(body.totals.pumps).toBe(2);
    const { body: detail } = await server.ask('GET', `/api/pumps/${other.pumps[0]!.pumpId}`, { as: other.manager });
    expect(detail.otherPumps).toEqual([{ id: other.pumps[1]!.pumpId, name: 'Booster', monitored: false }]);
  });
});

describe('pages of the fleet', () => {
  it('hold together exactly the whole list, in order, for every sort and size', async () => {
    const sort = fc.constantFrom('worst', 'name', 'rpm', 'watts', 'heard');
    await fc.assert(
      fc.asyncProperty(sort, fc.integer({ min: 1, max: 9 }), async (order, limit) => {
        const whole = idsOf(await list(`?sort=${order}`));
        const seen: string[] = [];
        let cursor: string | null = '';
        while (cursor !== null) {
          const page: FleetPage = await list(
            `?sort=${order}&limit=${limit}${cursor === '' ? '' : `&cursor=${cursor}`}`,
          );
          expect(page.items.length).toBeLessThanOrEqual(limit);
          seen.push(...idsOf(page));
          cursor = page.nextCursor;
        }
        expect(seen).toEqual(whole);
      }),
      { numRuns: 25 },
    );
  });

  it('refuse a cursor that is none', async () => {
    const { status, body } = await server.ask('GET', '/api/pumps?cursor=crooked', { as: company.manager });
    expect([status, body.issues[0].path]).toEqual([400, 'query.cursor']);
  });
});
