import { beforeAll, describe, expect, it } from 'vitest';
import { listCommissionedPumps } from '#server/db/commissioned-pumps.ts';
import type { Pools } from '#server/db/pools.ts';
import { openDatabase } from '#server/db/transaction.ts';
import { DETECTOR_DEFAULTS } from '#shared/domain/detectors/detector-defaults.data.ts';
import { hearNotices } from '#tests/support/heard-notices.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { openTestPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestServer } from '#tests/support/test-server.ts';

let pools: Pools & { superuserUrl: string };
let server: TestServer;
let company: TestCompany;

beforeAll(async () => {
  pools = await openTestPools();
  server = await startTestServer(pools);
  company = await makeTestCompany(pools.machine);
});

const get = (path: string, as = company.manager) => server.ask('GET', path, { as });
const put = (path: string, rules: unknown, version: number | string, as = company.manager) =>
  server.ask('PUT', path, { as, body: { rules }, headers: { 'If-Match': `"${version}"` } });
const rulesOf = async (pumpId: string) =>
  (await listCommissionedPumps(openDatabase(pools.machine), [pumpId]))[0]!.rules;
const modelId = async () => (await get('/api/rules')).body.models[0].scope.modelId as string;

describe('rules', () => {
  it('stand at their defaults, and say what each figure takes', async () => {
    const { status, body } = await get('/api/rules', company.technician);
    expect(status).toBe(200);
    expect(body.company).toMatchObject({ version: 0, rules: {}, changedAt: null });
    expect(body.models.map(({ name }: { name: string }) => name)).toEqual(['Three inputs']);
    const stopped = body.catalogue.find(({ detector }: { detector: string }) => detector === 'stopped');
    expect(stopped.figures).toContainEqual({
      ...{ name: 'delaySeconds', usual: DETECTOR_DEFAULTS.stopped.delaySeconds, unit: 's' },
      ...{ least: 0, most: 604_800, whole: true },
    });
  });

  it('are set for the company, a motor model and a pump, and the most specific wins figure by figure', async () => {
    const pump = company.pumps[0]!;
    const set = await put('/api/rules/company', { stopped: { figures: { delaySeconds: 600, frostCelsius: 1 } } }, 0);
    expect([set.status, set.body.version]).toEqual([200, 1]);
    await put(`/api/rules/models/${await modelId()}`, { stopped: { figures: { delaySeconds: 900 } } }, 0);
    const own = { stopped: { figures: { offDelaySeconds: 60 }, priority: 'urgent' }, silent: { enabled: false } };
    await put(`/api/rules/pumps/${pump.pumpId}`, own, 0);
    expect((await rulesOf(pump.pumpId)).stopped).toEqual({
      ...DETECTOR_DEFAULTS.stopped,
      ...{ delaySeconds: 900, frostCelsius: 1, offDelaySeconds: 60 },
    });
    expect((await rulesOf(pump.pumpId)).choices).toEqual({
      stopped: { priority: 'urgent' },
      silent: { enabled: false },
    });
    const other = await rulesOf(company.pumps[1]!.pumpId);
    expect([other.stopped.offDelaySeconds, other.choices]).toEqual([600, undefined]);
    const { body } = await get('/api/rules');
    expect(body.pumps).toMatchObject([{ scope: { kind: 'pump', pumpId: pump.pumpId }, rules: own, version: 1 }]);
    const above = { stopped: { figures: { delaySeconds: 900, frostCelsius: 1 } } };
    expect(body.pumps[0].inherited).toEqual(above);
    const theirs = await makeTestCompany(pools.machine);
    expect((await rulesOf(theirs.pumps[0]!.pumpId)).stopped).toEqual(DETECTOR_DEFAULTS.stopped);
  });

  it('name every figure that cannot be, with what it takes, and keep what stood', async () => {
    const before = await get('/api/rules/company');
    const wrong = {
      stopped: { figures: { delaySeconds: -5, delaySecond: 9, urgentAfterSeconds: 1.5 }, priority: 'loud' },
      'wrong-sped': {},
    };
    const { status, body } = await put('/api/rules/company', wrong, before.body.version);
    expect(status).toBe(400);
    const issues = Object.fromEntries(
      body.issues.map((one: { path: string; message: string }) => [one.path, one.message]),
    );
    expect(issues['rules.stopped.figures.delaySeconds']).toBe('takes a whole number from 0 to 604800 s');
    expect(issues['rules.stopped.figures.urgentAfterSeconds']).toBe('takes a whole number from 0 to 604800 s');
    expect(issues['rules.stopped.figures']).toMatch(/^has no such figure; there are delaySeconds, /);
    expect(issues['rules.stopped.priority']).toBe('is one of urgent, soon, note');
    expect(issues.rules).toMatch(/^has no such rule; there are /);
    expect((await get('/api/rules/company')).body).toEqual(before.body);
  });

  it('are changed by managers alone, for the version they read, and the change is written down', async () => {
    const path = `/api/rules/pumps/${company.pumps[1]!.pumpId}`;
    expect((await put(path, {}, 0, company.technician)).status).toBe(403);
    expect((await get('/api/rules', company.homeowner)).status).toBe(403);
    expect((await put(path, { stopped: { enabled: false } }, 0)).body.version).toBe(1);
    expect((await put(path, {}, 0)).status).toBe(412);
    expect((await server.ask('PUT', path, { as: company.manager, body: { rules: {} } })).status).toBe(428);
    expect((await put(path, { stopped: {} }, 1)).body).toMatchObject({
      rules: {},
      version: 2,
      changedBy: expect.any(String),
    });
    const { rows } = await pools.machine.query(
      `select detail from audit_entries where company_id = $1 and action = 'rules.set' and subject_id = $2 order by at, id`,
      [company.companyId, company.pumps[1]!.pumpId],
    );
    expect(rows.map(({ detail }) => [detail.before, detail.after])).toEqual([
      ['{}', '{"stopped":{"enabled":false}}'],
      ['{"stopped":{"enabled":false}}', '{}'],
    ]);
  });

  it('of another company are not there', async () => {
    const theirs = await makeTestCompany(pools.machine);
    const path = `/api/rules/pumps/${theirs.pumps[0]!.pumpId}`;
    expect([(await get(path)).status, (await put(path, {}, 0)).status]).toEqual([404, 404]);
  });

  it('tell whoever folds which pumps have other rules now', async () => {
    const { heard, catchUp } = await hearNotices(pools.superuserUrl, 'millrace_context');
    const { body } = await get('/api/rules/company');
    await put('/api/rules/company', body.rules, body.version);
    await catchUp();
    expect(heard.flatMap((payload) => payload.split(',')).sort()).toEqual(
      expect.arrayContaining(company.pumps.map(({ pumpId }) => pumpId)),
    );
  });
});
