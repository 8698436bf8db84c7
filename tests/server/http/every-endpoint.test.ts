import { beforeAll, describe, expect, it } from 'vitest';
import type { Pools } from '#server/db/pools.ts';
import { presentTariff } from '#server/features/tariffs/tariff-shape.ts';
import { Problem } from '#shared/contract/errors.ts';
import type { Endpoint } from '#shared/contract/http/endpoint.ts';
import { EVERY_ENDPOINT } from '#shared/contract/http/every-endpoint.ts';
import { TWO_TIER } from '#tests/shared/domain/energy/sample-tariffs.ts';
import { makeTestCompany, type TestCompany, type TestPerson } from '#tests/support/test-company.ts';
import { addAlarm, addDeviceTraces, addHour, setState } from '#tests/support/test-history.ts';
import { openTestPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestServer } from '#tests/support/test-server.ts';

let server: TestServer;
let ours: TestCompany;
let theirs: TestCompany;
let ids: { ours: Record<string, string>; neighbours: Record<string, string> };

beforeAll(async () => {
  const pools = await openTestPools();
  server = await startTestServer(pools);
  ours = await makeTestCompany(pools.machine);
  theirs = await makeTestCompany(pools.machine);
  const at = new Date(server.clock.now - 60_000);
  const idsOf = async ({ pumpId, deviceId }: TestCompany['pumps'][number]) => {
    await setState(pools.machine, pumpId, at);
    await addHour(pools.machine, pumpId, new Date(at.getTime() - 3_600_000));
    await addDeviceTraces(pools.machine, pumpId, deviceId, at);
    const { padId, tariffId } = await addTariff(pools, pumpId);
    const tried = await addBacktest(pools, pumpId);
    const alarmId = await addAlarm(pools.machine, pumpId, { from: at });
    return { pumpId, deviceId, padId, tariffId, alarmId, ...tried };
  };
  ids = { ours: await idsOf(ours.pumps[0]!), neighbours: await idsOf(ours.pumps[2]!) };
  await idsOf(theirs.pumps[0]!);
});

/** A tariff of the pump's company, and where the pump stands. */
async function addTariff({ machine }: Pools, pumpId: string) {
  const { rows } = await machine.query<{ companyId: string; padId: string; tariffId: string }>(
    `insert into tariffs (id, company_id, name, tariff) select gen_random_uuid(), company_id, 'Tariff ' || number, $2
     from pumps where id = $1
     returning id as "tariffId", company_id as "companyId", (select pad_id from pumps where id = $1) as "padId"`,
    [pumpId, JSON.stringify(TWO_TIER)],
  );
  return rows[0]!;
}

/** A backtest of the pump's company that has ended, and the model of a motor of theirs. */
async function addBacktest({ machine }: Pools, pumpId: string) {
  const request = { scope: { kind: 'company' }, scopeName: '', rules: {}, from: 0, to: 1, pumpIds: [pumpId] };
  const { rows } = await machine.query<{ backtestId: string; modelId: string }>(
    `insert into backtests (id, company_id, asked_at, state, request, pump_count)
     select gen_random_uuid(), company_id, now(), 'done', $2, 1 from pumps where id = $1
     returning id as "backtestId", (select id from motor_models m where m.company_id = backtests.company_id) as "modelId"`,
    [pumpId, JSON.stringify(request)],
  );
  return rows[0]!;
}

/** A query every endpoint with a window, a cursor or a list of pumps accepts. */
const queryFor = ({ path }: Endpoint, { pumpId }: Record<string, string>) => {
  const until = server.clock.now;
  const window = `from=${until - 86_400_000}&until=${until}`;
  if (path === '/api/strips') return `?pumps=${pumpId}&${window}`;
  if (path === '/api/changes') return '?since=1';
  return /runs|readings/.test(path) ? `?${window}` : '';
};

const bodyFor = ({ path, method, body }: Endpoint) => {
  if (body === undefined) return undefined;
  if (path === '/api/devices') return { serial: `T${crypto.randomUUID().slice(0, 8).toUpperCase()}` };
  if (path === '/api/session' && method === 'POST') return { email: 'nobody@company.example', password: 'wrong' };
  return BODIES[path] ?? {};
};

/** What some endpoints cannot do without. */
const BODIES: Readonly<Record<string, unknown>> = {
  '/api/alarms/:alarmId/shelf': { until: Date.now() + 3_600_000, reason: 'a part is ordered' },
  '/api/alarms/:alarmId/out-of-service': { reason: 'the pool is being rebuilt' },
  '/api/alarms/:alarmId/assignment': { technicianId: crypto.randomUUID() },
  '/api/alarms/:alarmId/done': { found: 'set the clock' },
  '/api/tariffs/:tariffId': presentTariff(TWO_TIER),
  '/api/pads/:padId/tariff-terms': { terms: [] },
  '/api/pumps/:pumpId/baseline': { baseline: null },
  '/api/rules/company': { rules: {} },
  '/api/rules/models/:modelId': { rules: {} },
  '/api/rules/pumps/:pumpId': { rules: {} },
  '/api/backtests': { scope: { kind: 'company' }, rules: {}, from: 0, to: 1 },
  '/api/alarms/acts': { acts: [{ alarmId: crypto.randomUUID(), act: { kind: 'acknowledge' } }] },
};

const call = (endpoint: Endpoint, params: Record<string, string>, as?: TestPerson) => {
  const path = endpoint.path.replace(/:(\w+)/g, (_, name: string) => params[name]!);
  const headers = endpoint.ifMatch === true ? { 'If-Match': '"1"' } : {};
  return server.ask(endpoint.method, `${path}${queryFor(endpoint, params)}`, { as, body: bodyFor(endpoint), headers });
};

const nameOf = ({ method, path }: Endpoint) => `${method} ${path}`;
const guarded = EVERY_ENDPOINT.filter(({ roles }) => roles !== 'public');
const withThing = guarded.filter(({ path }) => path.includes(':'));
const everybody = (company: TestCompany) => [company.manager, company.technician, company.homeowner, company.neighbour];
const mayCall = ({ roles }: Endpoint, { sight }: TestPerson) => roles !== 'public' && roles.includes(sight.role);

/** Whether an answer holds anything of a company: its ids, or the mark that all its names bear. */
const mentions = (body: unknown, company: TestCompany) => {
  const text = JSON.stringify(body ?? '');
  const mark = company.pumps[0]!.serial.slice(1, 11);
  return [mark, company.companyId, ...company.padIds, ...company.pumps.map(({ pumpId }) => pumpId)].filter((word) =>
    text.includes(word),
  );
};

describe.each(guarded.map((endpoint) => [nameOf(endpoint), endpoint] as const))('%s', (_name, endpoint) => {
  it('answers a stranger 401 and nothing else', async () => {
    const answer = await call(endpoint, ids.ours);
    expect(answer.status).toBe(401);
    expect(Problem.parse(answer.body)).toMatchObject({ code: 'unauthenticated', status: 401 });
    expect(answer.headers.get('Content-Type')).toContain('application/problem+json');
  });

  it('answers a person of another company nothing of ours', async () => {
    for (const person of everybody(theirs)) {
      const answer = await call(endpoint, ids.ours, person);
      expect(mentions(answer.body, ours)).toEqual([]);
      if (withThing.includes(endpoint)) expect([403, 404]).toContain(answer.status);
    }
  });

  it('is refused to the roles that may not call it, and only to them', async () => {
    for (const person of everybody(ours).slice(0, 3)) {
      const { status } = await call(endpoint, ids.ours, person);
      const isRefused = status === 403;
      expect(status).toBeLessThan(500);
      expect([person.sight.role, isRefused]).toEqual([person.sight.role, !mayCall(endpoint, person)]);
    }
  });
});

describe.each(withThing.map((endpoint) => [nameOf(endpoint), endpoint] as const))('%s', (_name, endpoint) => {
  it('does not find what belongs to another company, rather than forbid it', async () => {
    for (const person of everybody(theirs).filter((one) => mayCall(endpoint, one))) {
      expect((await call(endpoint, ids.ours, person)).status).toBe(404);
    }
  });

  it('does not find what belongs to another customer of the same company', async () => {
    if (!mayCall(endpoint, ours.homeowner)) return;
    expect((await call(endpoint, ids.neighbours, ours.homeowner)).status).toBe(404);
    expect((await call(endpoint, ids.ours, ours.homeowner)).status).toBe(200);
    expect((await call(endpoint, ids.ours, ours.neighbour)).status).toBe(404);
  });

  it('does not find a thing that nobody has, and names an id that is none', async () => {
    const person = everybody(ours).find((one) => mayCall(endpoint, one))!;
    const nowhere = Object.fromEntries(Object.keys(ids.ours).map((name) => [name, crypto.randomUUID()]));
    expect((await call(endpoint, nowhere, person)).status).toBe(404);
    const crooked = Object.fromEntries(Object.keys(ids.ours).map((name) => [name, 'crooked']));
    const answer = await call(endpoint, crooked, person);
    expect(answer.status).toBe(400);
    expect(Problem.parse(answer.body).issues?.[0]?.path).toMatch(/^params\.\w+Id$/);
  });
});

describe('lists', () => {
  it("show a homeowner their own pumps and alarms, and no name of staff's notes or other customers", async () => {
    const { body: fleet } = await server.ask('GET', '/api/pumps', { as: ours.homeowner });
    expect(fleet.items.map((row: { pumpId: string }) => row.pumpId).sort()).toEqual(
      ours.pumps
        .slice(0, 2)
        .map(({ pumpId }) => pumpId)
        .sort(),
    );
    expect(fleet.totals.pumps).toBe(2);
    const { body: alarms } = await server.ask('GET', '/api/alarms', { as: ours.homeowner });
    expect(alarms.items.map((alarm: { id: string }) => alarm.id)).toEqual([ids.ours.alarmId]);
    const { body: changes } = await server.ask('GET', '/api/changes?since=1', { as: ours.homeowner });
    expect(changes.pumps.map((pump: { pumpId: string }) => pump.pumpId)).toEqual([ids.ours.pumpId]);
    expect(JSON.stringify([fleet, alarms, changes])).not.toContain(ids.neighbours.pumpId);
  });
});

describe('the door', () => {
  it('is open for public endpoints only: the rest of /api answers a stranger 401, whatever the path', async () => {
    expect((await server.ask('GET', '/api/health')).status).toBe(200);
    for (const path of ['/api/none', '/api/pumps/x/y/z', '/api']) {
      expect([path, (await server.ask('GET', path)).status]).toEqual([path, 401]);
      expect([path, (await server.ask('GET', path, { as: ours.manager })).status]).toEqual([path, 404]);
    }
    expect((await server.ask('PUT', '/api/pumps', { as: ours.manager })).status).toBe(404);
  });
});
