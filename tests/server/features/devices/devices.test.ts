import { beforeAll, describe, expect, it } from 'vitest';
import { isDeviceSecret } from '#server/broker/device-credential.ts';
import type { Pools } from '#server/db/pools.ts';
import { hearNotices } from '#tests/support/heard-notices.ts';
import { makeTestCompany, TEST_DEVICE_KEY, type TestCompany } from '#tests/support/test-company.ts';
import { addDeviceTraces } from '#tests/support/test-history.ts';
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

const freshSerial = () => `T${crypto.randomUUID().slice(0, 8).toUpperCase()}`;
const ask = (method: string, path: string, more: { body?: unknown; headers?: Record<string, string> } = {}) =>
  server.ask(method, path, { as: company.manager, ...more });
const create = (body: object = {}) => ask('POST', '/api/devices', { body: { serial: freshSerial(), ...body } });

const findHash = async (deviceId: string): Promise<Buffer | null> =>
  (await pools.machine.query('select secret_hash from devices where id = $1', [deviceId])).rows[0].secret_hash;

const opens = async (deviceId: string, serial: string, secret: string) => {
  const secretHash = (await findHash(deviceId)) ?? undefined;
  return isDeviceSecret(TEST_DEVICE_KEY, { serial, secretHash }, Buffer.from(secret));
};

describe('registering a device', () => {
  it('answers a secret of 256 bits once; only its keyed hash is kept', async () => {
    const { status, body } = await create();
    expect(status).toBe(201);
    expect(Buffer.from(body.secret, 'base64url')).toHaveLength(32);
    expect(await opens(body.id, body.serial, body.secret)).toBe(true);
    expect((await findHash(body.id))?.includes(Buffer.from(body.secret))).toBe(false);
    const { body: list } = await ask('GET', `/api/devices?q=${body.serial}`);
    expect(list.items).toEqual([{ ...body, secret: undefined }]);
    expect(JSON.stringify(list)).not.toContain(body.secret);
  });

  it("puts it on a pump that has none, and refuses one that has, or that is another company's", async () => {
    const theirs = await makeTestCompany(pools.machine);
    const [first] = company.pumps;
    const taken = await create({ pumpId: first!.pumpId });
    expect([taken.status, taken.body.code]).toEqual([409, 'conflict']);
    const foreign = await create({ pumpId: theirs.pumps[0]!.pumpId });
    expect([foreign.status, foreign.body.issues[0].path]).toEqual([400, 'body.pumpId']);
    await pools.machine.query("update device_fittings set ends_at = '2024-06-01' where pump_id = $1", [first!.pumpId]);
    const { body } = await create({ pumpId: first!.pumpId });
    expect(body).toMatchObject({
      pumpId: first!.pumpId,
      padName: expect.stringMatching(/^Pad A/),
      state: 'never',
      version: 1,
    });
  });

  it('refuses a serial that is taken, by whichever company, in the same words', async () => {
    const theirs = await makeTestCompany(pools.machine);
    for (const { serial } of [company.pumps[1]!, theirs.pumps[0]!]) {
      const { status, body } = await create({ serial });
      expect([status, body.detail]).toEqual([409, `The serial ${serial} is registered already.`]);
    }
  });

  it('is written down', async () => {
    const { body } = await create();
    const { rows } = await pools.machine.query(
      'select action, actor_user_id, detail from audit_entries where subject_id = $1',
      [body.id],
    );
    expect(rows).toEqual([{ action: 'device.registered', actor_user_id: company.manager.userId, detail: {} }]);
  });
});

describe("a device's secret", () => {
  const match = (version: number) => ({ headers: { 'If-Match': `"${version}"` } });

  it('is replaced by a new one: the old one opens nothing, and the broker is told', async () => {
    const { heard, catchUp } = await hearNotices(pools.superuserUrl, 'millrace_credentials');
    const { body: before } = await create();
    const { status, body: after } = await ask('POST', `/api/devices/${before.id}/secret`, match(before.version));
    expect(status).toBe(200);
    expect(await opens(before.id, before.serial, before.secret)).toBe(false);
    expect(await opens(before.id, before.serial, after.secret)).toBe(true);
    await catchUp();
    expect(heard).toContain(before.serial);
  });

  it('is revoked: nothing opens until a new one is given', async () => {
    const { heard, catchUp } = await hearNotices(pools.superuserUrl, 'millrace_credentials');
    const { body: before } = await create();
    const { body: revoked } = await ask('DELETE', `/api/devices/${before.id}/secret`, match(before.version));
    expect(revoked).toMatchObject({ revokedAt: server.clock.now, version: before.version + 1 });
    expect(await findHash(before.id)).toBeNull();
    await catchUp();
    expect(heard).toContain(before.serial);
    const { body: again } = await ask('POST', `/api/devices/${before.id}/secret`, match(revoked.version));
    expect(again.revokedAt).toBeNull();
    expect(await opens(before.id, before.serial, again.secret)).toBe(true);
  });
});

describe('what was refused from a device', () => {
  it('is shown newest first, in pages, with the reason', async () => {
    const { pumpId, deviceId } = company.pumps[2]!;
    for (const minute of [3, 2, 1]) {
      await addDeviceTraces(pools.machine, pumpId, deviceId, new Date(server.clock.now - minute * 60_000));
    }
    const first = await ask('GET', `/api/devices/${deviceId}/refusals?limit=2`);
    const second = await ask('GET', `/api/devices/${deviceId}/refusals?limit=2&cursor=${first.body.nextCursor}`);
    const minutes = [...first.body.items, ...second.body.items].map(
      ({ receivedAt }) => (server.clock.now - receivedAt) / 60_000,
    );
    expect(minutes).toEqual([1, 2, 3]);
    expect(second.body.nextCursor).toBeNull();
    expect(first.body.items[0]).toMatchObject({ reason: 'w-negative', sample: '{"w":-3}' });
  });
});

describe('the list of devices', () => {
  it("is the company's, by serial, in pages that hold together", async () => {
    const other = await makeTestCompany(pools.machine, { pads: 6 });
    const seen: string[] = [];
    let cursor: string | null = '';
    while (cursor !== null) {
      const { body }: { body: { items: { serial: string }[]; nextCursor: string | null } } = await server.ask(
        'GET',
        `/api/devices?limit=3${cursor === '' ? '' : `&cursor=${cursor}`}`,
        { as: other.manager },
      );
      seen.push(...body.items.map(({ serial }) => serial));
      cursor = body.nextCursor;
    }
    expect(seen).toEqual(other.pumps.map(({ serial }) => serial).sort());
  });
});
