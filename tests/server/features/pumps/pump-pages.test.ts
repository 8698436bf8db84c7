import { beforeAll, describe, expect, it } from 'vitest';
import type { Pools } from '#server/db/pools.ts';
import type { Run } from '#shared/contract/http/runs.ts';
import { freshControlState, saveControlState } from '#shared/domain/control/control-state.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { addHour } from '#tests/support/test-history.ts';
import { openTestPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestServer } from '#tests/support/test-server.ts';

const HOUR_MS = 3_600_000;

let pools: Pools;
let server: TestServer;
let company: TestCompany;
let pumpId: string;
/** A whole hour, some hours ago. */
let start: number;

beforeAll(async () => {
  pools = await openTestPools();
  server = await startTestServer(pools);
  company = await makeTestCompany(pools.machine);
  pumpId = company.pumps[0]!.pumpId;
  start = Math.floor(server.clock.now / HOUR_MS) * HOUR_MS - 8 * HOUR_MS;
  for (const [hours, rpm] of [
    [0, 1700],
    [1, 2850],
    [2, 1700],
    [4, 2400],
  ] as const) {
    await addHour(pools.machine, pumpId, new Date(start + hours * HOUR_MS), rpm);
  }
});

const get = async (path: string) => {
  const { status, body } = await server.ask('GET', path, { as: company.manager });
  expect([path, status]).toEqual([path, 200]);
  return body;
};
const windowOf = (from: number, until: number) => `from=${start + from * HOUR_MS}&until=${start + until * HOUR_MS}`;
const hoursOf = (runs: Run[]) => runs.map(({ from }) => (from - start) / HOUR_MS);

describe('runs of a pump', () => {
  const runsIn = async (from: number, until: number) =>
    hoursOf((await get(`/api/pumps/${pumpId}/runs?${windowOf(from, until)}`)).runs);

  it('are those that lie in the window, half-open, the one that began before it included', async () => {
    expect(await runsIn(0, 8)).toEqual([0, 1, 2, 4]);
    expect(await runsIn(0.5, 1)).toEqual([0]);
    expect(await runsIn(1, 2)).toEqual([1]);
    expect(await runsIn(1.5, 4.5)).toEqual([1, 2, 4]);
    expect(await runsIn(3.2, 3.8)).toEqual([]);
    expect(await runsIn(-5, 0)).toEqual([]);
  });

  it('end with one that is still open', async () => {
    const other = await makeTestCompany(pools.machine);
    const id = other.pumps[0]!.pumpId;
    await addHour(pools.machine, id, new Date(start));
    await pools.machine.query('update runs set to_at = null where pump_id = $1', [id]);
    const { body } = await server.ask('GET', `/api/pumps/${id}/runs?${windowOf(5, 6)}`, { as: other.manager });
    expect(body.runs).toEqual([expect.objectContaining({ from: start, to: null, meanRpm: 1700 })]);
  });

  it('are followed by what is planned from now on, without a gap, to the end of the window', async () => {
    const until = server.clock.now + 24 * HOUR_MS;
    const { planned } = await get(`/api/pumps/${pumpId}/runs?from=${start}&until=${until}`);
    expect(planned[0].from).toBe(server.clock.now);
    expect(planned.at(-1).to).toBe(until);
    for (const [index, run] of planned.entries()) if (index > 0) expect(run.from).toBe(planned[index - 1].to);
    const sources = new Set(planned.map(({ source }: { source: string }) => source));
    expect(sources).toEqual(new Set(['off', 'prime', 'program', 'input']));
  });

  it('are planned by the motor’s own clock where that is known to be off', async () => {
    const other = await makeTestCompany(pools.machine);
    const id = other.pumps[0]!.pumpId;
    const now = server.clock.now;
    const until = now + 30 * HOUR_MS;
    const listStarts = async (): Promise<number[]> => {
      const { body } = await server.ask('GET', `/api/pumps/${id}/runs?from=${start}&until=${until}`, {
        as: other.manager,
      });
      const { body: strips } = await server.ask('GET', `/api/strips?pumps=${id}&from=${start}&until=${until}`, {
        as: other.manager,
      });
      expect(strips.strips[0].planned).toEqual(body.planned);
      const primes = body.planned.filter(({ source }: { source: string }) => source === 'prime');
      return primes.map(({ from }: { from: number }) => from);
    };
    const right = await listStarts();
    const control = saveControlState({ ...freshControlState(), learntOffset: -60 });
    const hot = JSON.stringify({ fold: { control } });
    await pools.machine.query(
      `insert into pump_states (pump_id, company_id, pump_number, hot, heard_at)
       select id, company_id, number, $2, now() from pumps where id = $1`,
      [id, hot],
    );
    // A start of less than an hour ago is still to come by a clock that is an hour late.
    const late = [(right[0] ?? 0) - 24 * HOUR_MS, ...right]
      .map((from) => from + HOUR_MS)
      .filter((from) => from > now && from < until);
    expect(late.length).toBeGreaterThan(0);
    expect(await listStarts()).toEqual(late);
  });

  it('are planned neither for the past nor for a pad that is winterized', async () => {
    expect((await get(`/api/pumps/${pumpId}/runs?${windowOf(0, 4)}`)).planned).toEqual([]);
    const other = await makeTestCompany(pools.machine);
    await pools.machine.query("update pads set state = 'winterized' where company_id = $1", [other.companyId]);
    const until = server.clock.now + HOUR_MS;
    const { body } = await server.ask('GET', `/api/pumps/${other.pumps[0]!.pumpId}/runs?from=${start}&until=${until}`, {
      as: other.manager,
    });
    expect(body.planned).toEqual([]);
  });

  it('are refused for a window that ends before it begins, or is longer than 35 days', async () => {
    for (const [from, until] of [
      [2, 1],
      [0, 36 * 24],
    ] as const) {
      const { status, body } = await server.ask('GET', `/api/pumps/${pumpId}/runs?${windowOf(from, until)}`, {
        as: company.manager,
      });
      expect([status, body.issues[0].path]).toEqual([400, 'query.until']);
    }
  });
});

describe('strips', () => {
  it('come in the order asked for, without those the person may not see', async () => {
    const theirs = await makeTestCompany(pools.machine);
    const asked = [company.pumps[2]!.pumpId, theirs.pumps[0]!.pumpId, pumpId];
    const { strips } = await get(`/api/strips?pumps=${asked.join(',')}&${windowOf(0, 8)}`);
    expect(strips.map((strip: { pumpId: string }) => strip.pumpId)).toEqual([asked[0], asked[2]]);
    expect([hoursOf(strips[0].runs), hoursOf(strips[1].runs)]).toEqual([[], [0, 1, 2, 4]]);
  });

  it('are empty for no pump, and refused for more than a hundred', async () => {
    expect((await get(`/api/strips?pumps=&${windowOf(0, 8)}`)).strips).toEqual([]);
    const many = Array.from({ length: 101 }, () => pumpId).join(',');
    expect(
      (await server.ask('GET', `/api/strips?pumps=${many}&${windowOf(0, 8)}`, { as: company.manager })).status,
    ).toBe(400);
  });
});

describe('readings of a pump', () => {
  const seriesOf = (from: number, until: number, width: number) =>
    get(`/api/pumps/${pumpId}/readings?${windowOf(from, until)}&width=${width}`);

  it('are columns of one length, each reading by itself where there is room', async () => {
    const series = await seriesOf(0, 2, 4000);
    expect(series.bucketMs).toBe(0);
    const { bucketMs: _bucketMs, coverage: _coverage, ...columns } = series;
    const isValue = (value: number | null) => value !== null;
    expect(new Set(Object.values(columns).map((column) => (column as unknown[]).length)).size).toBe(1);
    expect(series.rpm.filter(isValue)).toHaveLength(120);
    expect(series.rpm.filter(isValue)[0]).toBe(1700);
    expect(series.expectedRpm.filter(isValue).at(-1)).toBe(2850);
    expect(series.t).toEqual(series.t.toSorted((a: number, b: number) => a - b));
  });

  it('are gathered where there are more than points, with the extremes kept', async () => {
    await pools.machine.query(
      `insert into readings (at, received_at, pump_number, rpm, watts, closed_inputs, active_input)
       select to_timestamp($1::float8 / 1000), now(), number, 3450, 2000, 2, 2 from pumps where id = $2`,
      [start + 30 * 60_000 + 500, pumpId],
    );
    const series = await seriesOf(0, 1, 12);
    expect([series.bucketMs, series.t.length]).toEqual([300_000, 12]);
    expect(series.t[0]).toBe(start);
    expect(series.rpmMax).toEqual([...Array(6).fill(1700), 3450, ...Array(5).fill(1700)]);
    expect(series.wattsMin).toEqual(Array(12).fill(410));
    expect(series.rpm[6]).toBeCloseTo((5 * 1700 + 3450) / 6, 1);
    expect(series.closedInputs[6]).toBe(2);
    await pools.machine.query(
      'delete from readings where pump_number = (select number from pumps where id = $1) and rpm = 3450',
      [pumpId],
    );
  });

  it('have a null where nothing was measured', async () => {
    const series = await seriesOf(2, 5, 36);
    const gap = series.rpm.indexOf(null);
    expect(series.t[gap]).toBeGreaterThan(start + 3 * HOUR_MS - 1);
    expect(series.t[gap]).toBeLessThan(start + 4 * HOUR_MS);
    expect(series.rpm.filter((rpm: number | null) => rpm === null)).toHaveLength(1);
  });

  it('say how much of the window they cover', async () => {
    expect((await seriesOf(0, 2, 100)).coverage).toBeCloseTo(0.983, 2);
    expect((await seriesOf(2, 4, 100)).coverage).toBeCloseTo(0.492, 2);
    expect((await seriesOf(6, 7, 100)).coverage).toBe(0);
  });

  it('are empty columns where there are none', async () => {
    expect(await seriesOf(6, 7, 100)).toMatchObject({ t: [], rpm: [], expectedRpm: [] });
  });
});

describe('the page of a pump', () => {
  it('shows what is fitted, what is wired and who is responsible', async () => {
    const detail = await get(`/api/pumps/${pumpId}`);
    expect(detail).toMatchObject({
      purpose: 'filter',
      street: expect.stringMatching(/^Pad A .*, Testham$/),
      motor: {
        model: 'Three inputs',
        frame: '56Y',
        totalHorsepower: expect.closeTo(1.65, 3),
        installedAt: Date.parse('2024-05-01T07:00:00Z'),
      },
      wetEndModel: 'Wet end',
      equipment: [{ kind: 'heater', input: 1, minimumGpm: 30, interlock: 'flow-switch' }],
      device: { serial: company.pumps[0]!.serial, state: 'never', firmware: null },
      technicianName: expect.stringMatching(/^Technician/),
      customerName: expect.stringMatching(/^Customer owner/),
      nominalVolts: 230,
      poolGallons: 18_000,
      learning: true,
      otherPumps: [{ id: company.pumps[1]!.pumpId, name: 'Booster', monitored: true }],
    });
    expect(JSON.stringify(detail)).not.toContain('gate ');
  });

  it('tells a homeowner from when they may see it', async () => {
    const { body } = await server.ask('GET', `/api/pumps/${pumpId}`, { as: company.homeowner });
    expect(body.visibleFrom).toBe(Date.parse('2024-05-01T07:00:00Z'));
    expect(body.customerName).toBeNull();
    expect(body.technicianName).toMatch(/^Technician/);
  });
});
