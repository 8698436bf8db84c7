import { beforeAll, describe, expect, it } from 'vitest';
import type { Pools } from '#server/db/pools.ts';
import { asPerson, type Sight } from '#server/db/transaction.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { addAlarm, addHour, setState } from '#tests/support/test-history.ts';
import { openTestPools } from '#tests/support/test-pools.ts';

type Plan = {
  'Node Type': string;
  'Parent Relationship'?: string;
  'Relation Name'?: string;
  'Actual Loops': number;
  'Actual Rows': number;
  Plans?: Plan[];
};

let pools: Pools;
let company: TestCompany;
let number: number;

beforeAll(async () => {
  pools = await openTestPools();
  company = await makeTestCompany(pools.machine, { pads: 30 });
  for (const { pumpId } of company.pumps) {
    await setState(pools.machine, pumpId, new Date());
    await addAlarm(pools.machine, pumpId);
    for (const hours of [1, 2, 3]) await addHour(pools.machine, pumpId, new Date(Date.now() - hours * 3_600_000));
  }
  const { rows } = await pools.machine.query('select number from pumps where id = $1', [company.pumps[0]!.pumpId]);
  number = rows[0].number;
});

const explain = (sight: Sight, query: string): Promise<Plan> =>
  asPerson(pools.app, sight, 'read', async (_db, client) => {
    const { rows } = await client.query(`explain (analyze, format json) ${query}`);
    return rows[0]['QUERY PLAN'][0].Plan;
  });

function* nodesOf(plan: Plan): Generator<Plan> {
  yield plan;
  for (const child of plan.Plans ?? []) yield* nodesOf(child);
}

/** How often the busiest sub-select of a plan ran. */
const busiest = (plan: Plan): number =>
  Math.max(
    0,
    ...[...nodesOf(plan)]
      .filter((node) => ['SubPlan', 'InitPlan'].includes(node['Parent Relationship'] ?? ''))
      .map((node) => node['Actual Loops']),
  );

const hotReads = (): [string, string][] => {
  const { pumpId } = company.pumps[0]!;
  return [
    ['runs of a pump', `select * from runs where pump_id = '${pumpId}' and from_at > now() - interval '1 day'`],
    ['readings of a pump', `select * from readings where pump_number = ${number} and at > now() - interval '1 day'`],
    ['open alarms', "select * from alarms where state <> 'normal'"],
    ['every state', 'select * from pump_states'],
    ['every pump', 'select * from pumps'],
    ['every pad', 'select * from pads'],
    ['what changed', "select * from runs where changed_in >= '1'"],
    ['devices', 'select id from devices'],
    ['wiring', 'select * from inputs'],
  ];
};

describe('row-level security', () => {
  it('asks each of its questions once a statement, not once a row, for staff and homeowners', async () => {
    for (const { sight } of [company.manager, company.homeowner]) {
      for (const [name, query] of hotReads()) {
        const plan = await explain(sight, query);
        expect([name, sight.role, plan['Actual Rows'] > 0]).toEqual([name, sight.role, true]);
        expect([name, sight.role, busiest(plan) <= 1]).toEqual([name, sight.role, true]);
      }
    }
  });

  it('lets a window of readings touch the partitions of its days alone', async () => {
    const window = "at >= now() - interval '1 day' and at < now()";
    const plan = await explain(
      company.manager.sight,
      `select * from readings where pump_number = ${number} and ${window}`,
    );
    const touched = [...nodesOf(plan)]
      .map((node) => node['Relation Name'] ?? '')
      .filter((name) => name.startsWith('readings_'));
    expect(new Set(touched).size).toBeLessThanOrEqual(2);
  });

  it('would be caught asking once a row', async () => {
    const query = 'select * from pumps p where exists (select from pads where pads.id = p.pad_id or random() < 0)';
    expect(busiest(await explain(company.manager.sight, query))).toBeGreaterThan(1);
  });
});
