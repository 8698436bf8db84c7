import { beforeAll, describe, expect, it } from 'vitest';
import { newId } from '#server/db/new-id.ts';
import type { Pools } from '#server/db/pools.ts';
import type { AlarmHealth } from '#shared/contract/http/alarm-health.ts';
import type { TransitionKind } from '#shared/domain/alarms/alarm-record.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { addAlarm, addHour, type TestAlarm } from '#tests/support/test-history.ts';
import { openTestPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestServer } from '#tests/support/test-server.ts';

const MINUTE = 60_000;
const DAY = 86_400_000;

let pools: Pools;
let server: TestServer;
let company: TestCompany;

beforeAll(async () => {
  pools = await openTestPools();
  server = await startTestServer(pools);
  company = await makeTestCompany(pools.machine, { pads: 3 });
});

const ask = (query = '', as = company.manager) => server.ask('GET', `/api/alarm-health${query}`, { as });
const read = async (query = ''): Promise<AlarmHealth> => {
  const { status, body } = await ask(query);
  expect([query, status]).toEqual([query, 200]);
  return body;
};

/** An alarm with what became of it: the columns and the transitions that the state machine would have written. */
async function addLife(
  pump: number,
  daysAgo: number,
  then: readonly (readonly [TransitionKind, number])[],
  more: TestAlarm = {},
) {
  const from = server.clock.now - daysAgo * DAY;
  const alarmId = await addAlarm(pools.machine, company.pumps[pump]!.pumpId, {
    detector: 'stopped',
    priority: 'soon',
    ...more,
    from: new Date(from),
  });
  for (const [kind, minutes] of then) {
    const person = kind === 'acknowledged' || kind === 'shelved' ? company.technician.userId : null;
    await pools.machine.query(
      `insert into alarm_transitions (id, company_id, alarm_id, at, kind, by_user_id, note, priority, cause)
       values ($1, $2, $3, $4, $5, $6, $7, $8, 'unknown')`,
      [
        newId(),
        company.companyId,
        alarmId,
        new Date(from + minutes * MINUTE),
        kind,
        person,
        'why',
        more.priority ?? 'soon',
      ],
    );
  }
  const over = then.find(([kind]) => kind === 'returned');
  if (over !== undefined) {
    await pools.machine.query('update alarms set state = $2, returned_at = $3 where id = $1', [
      alarmId,
      'normal',
      new Date(from + over[1] * MINUTE),
    ]);
  }
  return alarmId;
}

describe('alarm health', () => {
  let stale: string;
  beforeAll(async () => {
    await addHour(pools.machine, company.pumps[0]!.pumpId, new Date(server.clock.now - 45 * DAY));
    for (const daysAgo of [1, 2, 3, 4]) {
      await addLife(0, daysAgo, [
        ['acknowledged', 10],
        ['returned', 60],
      ]);
    }
    await addLife(
      2,
      5,
      [
        ['escalated', 15],
        ['acknowledged', 30],
        ['returned', 90],
      ],
      { priority: 'urgent' },
    );
    stale = await addLife(3, 6, [['acknowledged', 20]]);
    await addLife(1, 40, [['returned', 5]]);
    await addLife(1, 2, [], { detector: 'keypad-hold', priority: 'note' });
  });

  it('counts what was put before the desk in the last 30 days and today, and nothing else', async () => {
    const { desk, from, until, leastDays } = await read();
    expect((until - from) / DAY).toBeGreaterThan(30);
    expect(leastDays).toBe(30);
    // A hold on the keypad is a note: its class here is an alarm's, its priority is not.
    expect(desk.count).toBe(6);
    expect(desk.perDay).toBeCloseTo(6 / desk.days, 9);
    expect(desk.priorities).toEqual({ urgent: 1, soon: 5, note: 0 });
    expect(desk.byDay.reduce((sum, { urgent, soon, note }) => sum + urgent + soon + note, 0)).toBe(6);
    expect(desk.periods.count).toBe(Math.ceil(until / 600_000) - Math.floor(from / 600_000));
  });

  it('names the worst offender and what is stale, so that a person can open them', async () => {
    const { desk } = await read();
    expect(desk.topTen[0]).toMatchObject({
      pumpId: company.pumps[0]!.pumpId,
      pumpName: 'Filter pump',
      detector: 'stopped',
      count: 4,
    });
    expect(desk.topTen[0]?.padName).toMatch(/^Pad A/);
    expect(desk.stale).toMatchObject({ nowCount: 1, most: 1, now: [{ alarmId: stale }] });
  });

  it('times acknowledgements by priority against the limits', async () => {
    const [urgent, soon] = (await read()).desk.acknowledging;
    expect(urgent).toMatchObject({ count: 1, medianMs: 30 * MINUTE, limitMs: 15 * MINUTE, inTime: 0, escalated: 1 });
    expect(soon).toMatchObject({ count: 5, medianMs: 10 * MINUTE, slowMs: 20 * MINUTE, inTime: 5, waiting: 0 });
  });

  it('judges every figure, and says where the target comes from', async () => {
    const { desk } = await read();
    const verdicts = Object.fromEntries(desk.judgements.map(({ metric, verdict }) => [metric, verdict]));
    expect(verdicts).toMatchObject({
      rate: 'within',
      peak: 'within',
      'top-ten': 'few',
      stale: 'within',
      priorities: 'few',
    });
    expect(desk.judgements.every(({ source }) => source.includes('ISA-18.2'))).toBe(true);
  });

  it('has the same figures for each technician, over their own pads', async () => {
    const { operators, desk } = await read();
    expect(operators.map(({ operatorId }) => operatorId)).toEqual([company.technician.userId]);
    expect(operators[0]?.name).toMatch(/^Technician/);
    expect(operators[0]?.figures.count).toBe(desk.count);
  });

  it('reaches back as far as it is asked to, cut off where nothing was known yet', async () => {
    const day = (daysAgo: number) => new Date(server.clock.now - daysAgo * DAY).toISOString().slice(0, 10);
    const early = await read(`?from=${day(60)}&until=${day(35)}`);
    expect(early.desk.count).toBe(1);
    expect(early.from).toBeCloseTo(server.clock.now - 45 * DAY, -4);
    expect((await read(`?from=${day(200)}&until=${day(100)}`)).desk).toMatchObject({
      count: 0,
      days: 0,
      topTenShare: null,
    });
  });

  it('refuses days that come alone, the wrong way round or too many', async () => {
    for (const query of [
      '?from=2026-01-01',
      '?from=2026-02-01&until=2026-01-01',
      '?from=2024-01-01&until=2026-01-01',
      '?from=soon&until=late',
    ])
      expect([query, (await ask(query)).status]).toEqual([query, 400]);
  });

  it('is a manager’s to read, of their own company alone', async () => {
    expect((await ask('', company.technician)).status).toBe(403);
    expect((await ask('', company.homeowner)).status).toBe(403);
    const other = await makeTestCompany(pools.machine);
    expect((await ask('', other.manager)).body.desk).toMatchObject({ count: 0, topTen: [] });
  });
});
