import fc from 'fast-check';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Pools } from '#server/db/pools.ts';
import type { AlarmState } from '#server/db/schema/alarms.ts';
import type { Alarm, AlarmPage } from '#shared/contract/http/alarms.ts';
import type { Detector, Priority } from '#shared/domain/detectors/detector.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { addAlarm } from '#tests/support/test-history.ts';
import { openTestPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestServer } from '#tests/support/test-server.ts';

let pools: Pools;
let server: TestServer;
let company: TestCompany;
const ids: Record<string, string> = {};

beforeAll(async () => {
  pools = await openTestPools();
  server = await startTestServer(pools);
  company = await makeTestCompany(pools.machine, { pads: 4 });
  const add = async (
    name: string,
    pump: number,
    minutesAgo: number,
    detector: Detector,
    priority: Priority,
    state: AlarmState,
  ) => {
    const from = new Date(server.clock.now - minutesAgo * 60_000);
    ids[name] = await addAlarm(pools.machine, company.pumps[pump]!.pumpId, { from, detector, priority, state });
  };
  await add('seen', 2, 10, 'failed-prime', 'urgent', 'acknowledged');
  await add('waiting', 3, 20, 'failed-prime', 'urgent', 'unacknowledged');
  await add('soon', 0, 5, 'wrong-speed', 'soon', 'unacknowledged');
  await add('returned', 1, 30, 'stopped', 'soon', 'returned');
  await add('note', 4, 1, 'keypad-hold', 'note', 'unacknowledged');
  await add('history', 0, 500, 'silent', 'soon', 'normal');
});

const list = async (query = ''): Promise<AlarmPage> => {
  const { status, body } = await server.ask('GET', `/api/alarms${query}`, { as: company.manager });
  expect([query, status]).toEqual([query, 200]);
  return body;
};
const namesOf = ({ items }: { items: Alarm[] }) =>
  items.map(({ id }) => Object.keys(ids).find((name) => ids[name] === id));

describe('the list of alarms', () => {
  it('shows open ones, the worst first, those nobody has seen before those somebody has', async () => {
    expect(namesOf(await list())).toEqual(['waiting', 'seen', 'soon', 'returned', 'note']);
  });

  it('shows what waits, what is history, or all of it', async () => {
    expect(namesOf(await list('?show=unacknowledged'))).toEqual(['waiting', 'soon', 'returned', 'note']);
    expect(namesOf(await list('?show=history'))).toEqual(['history']);
    expect(await list('?show=all')).toMatchObject({ items: { length: 6 } });
  });

  it('sorts by age and by name', async () => {
    expect(namesOf(await list('?sort=newest'))).toEqual(['note', 'soon', 'seen', 'waiting', 'returned']);
    expect(namesOf(await list('?sort=oldest'))).toEqual(['returned', 'waiting', 'seen', 'soon', 'note']);
    expect(namesOf(await list('?sort=name'))).toEqual(['soon', 'returned', 'seen', 'waiting', 'note']);
  });

  it('filters by priority, detector, pump, area and words', async () => {
    expect(namesOf(await list('?priority=urgent'))).toEqual(['waiting', 'seen']);
    expect(namesOf(await list('?detector=wrong-speed'))).toEqual(['soon']);
    expect(namesOf(await list(`?pumpId=${company.pumps[0]!.pumpId}&show=all`)).sort()).toEqual(['history', 'soon']);
    expect(namesOf(await list('?area=South'))).toEqual(['seen', 'note']);
    expect(namesOf(await list('?q=booster'))).toEqual(['returned']);
    expect(namesOf(await list('?q=%25'))).toEqual([]);
  });

  it('counts the open ones, whatever the filter', async () => {
    const aside = { shelved: 0, suppressed: 0, outOfService: 0 };
    const totals = { urgent: 2, soon: 2, note: 1, unacknowledged: 4, ...aside };
    expect((await list('?priority=note')).totals).toEqual(totals);
  });

  it('is the same list in pages of any size and order', async () => {
    const sort = fc.constantFrom('worst', 'newest', 'oldest', 'name');
    await fc.assert(
      fc.asyncProperty(sort, fc.integer({ min: 1, max: 7 }), async (order, limit) => {
        const whole = namesOf(await list(`?show=all&sort=${order}`));
        const seen: (string | undefined)[] = [];
        let cursor: string | null = '';
        while (cursor !== null) {
          const page: AlarmPage = await list(
            `?show=all&sort=${order}&limit=${limit}${cursor === '' ? '' : `&cursor=${cursor}`}`,
          );
          seen.push(...namesOf(page));
          cursor = page.nextCursor;
        }
        expect(seen).toEqual(whole);
      }),
      { numRuns: 20 },
    );
  });
});
