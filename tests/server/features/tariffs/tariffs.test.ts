import { beforeAll, describe, expect, it } from 'vitest';
import type { Pools } from '#server/db/pools.ts';
import { presentTariff, toTariff } from '#server/features/tariffs/tariff-shape.ts';
import type { Tariff } from '#shared/domain/energy/tariff.ts';
import { TIME_OF_USE, TWO_TIER } from '#tests/shared/domain/energy/sample-tariffs.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { openTestPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestServer } from '#tests/support/test-server.ts';

let pools: Pools;
let server: TestServer;
let ours: TestCompany;

beforeAll(async () => {
  pools = await openTestPools();
  server = await startTestServer(pools);
  ours = await makeTestCompany(pools.machine, { pads: 3 });
});

const ask = (method: string, path: string, body?: unknown, version?: number) =>
  server.ask(method, path, {
    as: ours.manager,
    body,
    headers: version === undefined ? {} : { 'If-Match': `"${version}"` },
  });

const create = async (tariff: Tariff) => {
  const answer = await ask(
    'POST',
    '/api/tariffs',
    presentTariff({ ...tariff, name: `${tariff.name} ${crypto.randomUUID()}` }),
  );
  expect(answer.status).toBe(201);
  return answer.body;
};

describe('pads with terms of their own', () => {
  it('are listed with the tariff of today, none of another company’s among them', async () => {
    const stranger = await makeTestCompany(pools.machine);
    const { id } = await create(TWO_TIER);
    const next = await create(TIME_OF_USE);
    const terms = [
      { tariffId: id, from: '2020-01-01', to: '2990-01-01' },
      { tariffId: next.id, from: '2990-01-01', to: null },
    ];
    const path = `/api/pads/${ours.padIds[2]}/tariff-terms`;
    const put = async (given: unknown[], version: number) =>
      (await ask('PUT', path, { terms: given, ownMeter: false, otherKwhByPeriod: [] }, version)).status;
    expect(await put(terms, 0)).toBe(200);
    const { body } = await ask('GET', '/api/tariff-terms/pads');
    expect(body).toMatchObject({ count: 1, items: [{ padId: ours.padIds[2], tariffId: id, terms: 2 }] });
    const other = await server.ask('GET', '/api/tariff-terms/pads', { as: stranger.manager });
    expect(other.body).toEqual({ items: [], count: 0 });
    expect((await server.ask('GET', '/api/tariff-terms/pads', { as: ours.technician })).status).toBe(403);
    expect(await put([], 1)).toBe(200);
    expect((await ask('GET', '/api/tariff-terms/pads')).body).toEqual({ items: [], count: 0 });
    for (const tariffId of [id, next.id]) expect((await ask('DELETE', `/api/tariffs/${tariffId}`)).status).toBe(204);
  });
});

describe('a tariff', () => {
  it.each([TWO_TIER, TIME_OF_USE])('goes over the wire and back without losing a millionth: $name', (tariff) => {
    expect(toTariff(presentTariff(tariff))).toEqual(tariff);
  });

  it('with a hole is refused by name, with what is allowed there, and nothing is stored', async () => {
    const shape = presentTariff(TIME_OF_USE);
    const weekday: (number | null)[][] = shape.energy.weekday.map((hours) => [...hours]);
    weekday[6]![17] = null;
    const { status, body } = await ask('POST', '/api/tariffs', { ...shape, energy: { ...shape.energy, weekday } });
    expect(status).toBe(400);
    expect(body.issues).toEqual([
      {
        path: 'energy.weekday[6][17]',
        message: 'hole-in-schedule: a period for month 7 at 17:00: twelve months of 24 hours',
      },
    ]);
    expect((await ask('GET', '/api/tariffs')).body.items).toEqual([]);
  });

  it('takes a name that another takes at the same moment from one of the two, and says so to the other', async () => {
    for (let round = 0; round < 4; round += 1) {
      const [one, other] = [await create(TWO_TIER), await create(TIME_OF_USE)];
      const name = `Renamed ${crypto.randomUUID()}`;
      const answers = await Promise.all([
        ask('PUT', `/api/tariffs/${one.id}`, { ...one.tariff, name }, 1),
        ask('PUT', `/api/tariffs/${other.id}`, { ...other.tariff, name }, 1),
        ask('POST', '/api/tariffs', { ...one.tariff, name }),
      ]);
      expect(answers.map(({ status }) => status).filter((status) => status === 409)).toHaveLength(2);
    }
  });

  it('with a last tier that ends is refused: use above it has no price', async () => {
    const shape = presentTariff(TWO_TIER);
    const [tiers] = shape.energy.periods;
    const periods = [tiers!.map((tier) => ({ ...tier, upTo: tier.upTo ?? 900 }))];
    const { body } = await ask('POST', '/api/tariffs', { ...shape, energy: { ...shape.energy, periods } });
    expect(body.issues[0]).toMatchObject({ path: 'energy.periods[0][1].upTo' });
    expect(body.issues[0].message).toMatch(/^hole-above-last-tier/);
  });

  it('is checked while it is written, as a form or as a file, without being stored', async () => {
    const good = await ask('POST', '/api/tariffs/check', { tariff: presentTariff(TWO_TIER) });
    expect(good.body).toMatchObject({ faults: [], unused: [] });
    const matrix = Array.from({ length: 12 }, () => Array(24).fill(0));
    const rateSchedule = {
      name: 'From a file',
      energyratestructure: [[{ rate: 0.2 }]],
      energyweekdayschedule: matrix,
      energyweekendschedule: matrix.slice(0, 3),
      sector: 'Residential',
    };
    const holed = await ask('POST', '/api/tariffs/check', { rateSchedule });
    expect(holed.body.faults[0]).toMatchObject({ reason: 'hole-in-schedule' });
    const whole = await ask('POST', '/api/tariffs/check', {
      rateSchedule: { ...rateSchedule, energyweekendschedule: matrix },
    });
    expect(whole.body).toMatchObject({ faults: [], unused: ['sector'], tariff: { name: 'From a file' } });
  });

  it('is corrected by who has read it last, and by no other', async () => {
    const made = await create(TWO_TIER);
    const shape = { ...made.tariff, fixedPerMonth: '14.5' };
    expect((await ask('PUT', `/api/tariffs/${made.id}`, shape)).status).toBe(428);
    const changed = await ask('PUT', `/api/tariffs/${made.id}`, shape, made.version);
    expect([changed.status, changed.body]).toMatchObject([200, { version: 2, tariff: { fixedPerMonth: '14.5' } }]);
    expect((await ask('PUT', `/api/tariffs/${made.id}`, shape, made.version)).status).toBe(412);
  });

  it('bears a name of its own', async () => {
    const made = await create(TWO_TIER);
    expect((await ask('POST', '/api/tariffs', made.tariff)).status).toBe(409);
  });
});

describe('the terms', () => {
  it('name tariffs without a hole between them, or are refused by name', async () => {
    const [one, other] = [await create(TWO_TIER), await create(TIME_OF_USE)];
    const path = `/api/pads/${ours.padIds[1]}/tariff-terms`;
    const hole = [
      { tariffId: one.id, from: '2025-01-01', to: '2025-06-01' },
      { tariffId: other.id, from: '2025-06-02', to: null },
    ];
    const refused = await ask('PUT', path, { terms: hole }, 0);
    expect(refused.status).toBe(400);
    expect(refused.body.issues[0]).toMatchObject({ path: 'terms[1].from' });
    expect(refused.body.issues[0].message).toMatch(/^hole-between-terms/);
    const ended = await ask('PUT', path, { terms: hole.slice(0, 1) }, 0);
    expect(ended.body.issues[0]).toMatchObject({ path: 'terms[0].to' });
    const stranger = await ask(
      'PUT',
      path,
      { terms: [{ tariffId: crypto.randomUUID(), from: '2025-01-01', to: null }] },
      0,
    );
    expect(stranger.body.issues[0].message).toMatch(/^unknown-tariff/);
    const terms = [hole[0], { ...hole[1], from: '2025-06-01' }];
    const said = await ask('PUT', path, { terms, ownMeter: true, otherKwhByPeriod: [400] }, 0);
    expect([said.status, said.body]).toMatchObject([200, { terms, ownMeter: true, inherited: false, version: 1 }]);
  });

  it('of a pad without its own are the company’s', async () => {
    const made = await create(TWO_TIER);
    const { version } = (await ask('GET', '/api/tariff-terms')).body;
    const terms = [{ tariffId: made.id, from: '2020-01-01', to: null }];
    expect((await ask('PUT', '/api/tariff-terms', { terms }, version)).status).toBe(200);
    const { body } = await ask('GET', `/api/pads/${ours.padIds[0]}/tariff-terms`);
    expect(body).toMatchObject({ terms, inherited: true, version: 0 });
  });

  it('keep a tariff that they name from being deleted', async () => {
    const { terms } = (await ask('GET', '/api/tariff-terms')).body;
    const inUse = await ask('DELETE', `/api/tariffs/${terms[0].tariffId}`);
    expect([inUse.status, inUse.body.detail]).toEqual([409, expect.stringContaining('among the terms of the company')]);
    const spare = await create(TWO_TIER);
    expect((await ask('DELETE', `/api/tariffs/${spare.id}`)).status).toBe(204);
    expect((await ask('GET', `/api/tariffs/${spare.id}`)).status).toBe(404);
  });

  it('and the grid’s factors are the company’s to choose among those known', async () => {
    expect((await ask('PUT', '/api/carbon', { region: 'NOWHERE' }, 0)).body.issues[0].path).toBe('region');
    expect((await ask('PUT', '/api/carbon', { region: 'US' }, 0)).body).toMatchObject({ region: 'US', version: 1 });
    expect((await ask('PUT', '/api/carbon', { region: null }, 0)).status).toBe(412);
  });

  it('is chosen by one of two people who choose at once; the other is told', async () => {
    for (let version = 1; version <= 5; version += 1) {
      const both = await Promise.all(['US', 'AZNM'].map((region) => ask('PUT', '/api/carbon', { region }, version)));
      expect(both.map(({ status }) => status).sort()).toEqual([200, 412]);
    }
  });
});
