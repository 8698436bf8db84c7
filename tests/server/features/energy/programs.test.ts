import { randomBytes } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { hashDeviceSecret } from '#server/broker/device-credential.ts';
import type { Pools } from '#server/db/pools.ts';
import { type CommissionedCompany, commissionCompany } from '#server/db/seed/commission-company.ts';
import { asMachine } from '#server/db/transaction.ts';
import { listUnadvisedPumps } from '#server/rollup/advice-repository.ts';
import { advisePumpNow } from '#server/rollup/advise-pump-now.ts';
import { LARKMOOR } from '#shared/contract/demo/larkmoor.data.ts';
import type { Role } from '#shared/contract/primitives.ts';
import { TEST_DEVICE_KEY, type TestPerson } from '#tests/support/test-company.ts';
import { openFreshPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestServer } from '#tests/support/test-server.ts';

let pools: Pools;
let server: TestServer;
let company: CommissionedCompany;
const advised: string[] = [];

const personOf = (email: string, role: Role): TestPerson => {
  const userId = company.userIds.get(email)!;
  return { userId, email, sight: { companyId: company.companyId, userId, role, customerId: undefined } };
};

beforeAll(async () => {
  pools = await openFreshPools();
  server = await startTestServer(pools);
  company = await asMachine(pools.machine, (db) =>
    commissionCompany(db, LARKMOOR, {
      hashPassword: async () => randomBytes(8).toString('hex'),
      hashSecret: (secret) => hashDeviceSecret(TEST_DEVICE_KEY, secret),
    }),
  );
  for (const pumpId of await listUnadvisedPumps(pools.machine, 4)) {
    await advisePumpNow(
      { pool: pools.machine, publicUrl: 'https://watch.larkmoor.example', now: server.clock.now },
      pumpId,
    );
    advised.push(pumpId);
  }
}, 120_000);

const ask = (path: string, email: string, role: Role) => server.ask('GET', path, { as: personOf(email, role) });
const asManager = (path: string) => ask(path, 'manager@larkmoor.example', 'manager');

describe('advice for programs', () => {
  it('is kept with its tariff, its before and its after', async () => {
    for (const pumpId of advised) {
      const { status, body } = await asManager(`/api/pumps/${pumpId}/advice`);
      expect([status, body.advice.kind]).toEqual([200, expect.stringMatching(/^(advice|keep|infeasible)$/)]);
      expect(body.advice).toMatchObject({
        tariffName: expect.stringMatching(/^Tarnwick/),
        currency: 'USD',
        reasons: [],
      });
      expect(body.advice.before.kwhPerMonth).toBeGreaterThan(0);
      expect(body.advice.before.costPerMonth).toMatch(/^\d+\.\d\d$/);
    }
  });

  it('is listed by what it saves, and says how many pumps still wait', async () => {
    const { body } = await asManager('/api/energy/programs?show=all');
    expect(body).toMatchObject({ matching: advised.length, advised: advised.length });
    expect(body.waiting).toBeGreaterThan(0);
    const saved = body.items.map((item: { savedPerMonth: string | null }) => Number(item.savedPerMonth ?? -1e9));
    expect(saved).toEqual([...saved].sort((left, right) => right - left));
    for (const show of ['costly', 'dear-hours'])
      for (const sort of ['saved', 'share', 'name'])
        expect((await asManager(`/api/energy/programs?show=${show}&sort=${sort}`)).status).toBe(200);
  });

  it('turns page by page without a row twice', async () => {
    const first = (await asManager('/api/energy/programs?show=all&limit=2')).body;
    const next = (await asManager(`/api/energy/programs?show=all&limit=2&cursor=${first.nextCursor}`)).body;
    const ids = [...first.items, ...next.items].map((item: { pumpId: string }) => item.pumpId);
    expect(ids).toHaveLength(advised.length);
    expect(new Set(ids).size).toBe(advised.length);
  });

  it('is for staff: it is a technician who changes a program, and never a homeowner', async () => {
    const path = `/api/pumps/${advised[0]}/advice`;
    expect((await ask(path, 'tech@larkmoor.example', 'technician')).status).toBe(200);
    expect((await ask(path, 'home@larkmoor.example', 'homeowner')).status).toBe(403);
  });

  it('is made for pumps that have none yet before others', async () => {
    expect((await listUnadvisedPumps(pools.machine, 100)).some((pumpId) => advised.includes(pumpId))).toBe(false);
  });
});
