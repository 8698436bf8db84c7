import { beforeAll, describe, expect, it } from 'vitest';
import type { Pools } from '#server/db/pools.ts';
import { Problem } from '#shared/contract/errors.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { setState } from '#tests/support/test-history.ts';
import { openTestPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestServer } from '#tests/support/test-server.ts';

let pools: Pools;
let server: TestServer;
let company: TestCompany;

beforeAll(async () => {
  pools = await openTestPools();
  server = await startTestServer(pools);
  company = await makeTestCompany(pools.machine);
});

const freshSerial = () => `T${crypto.randomUUID().slice(0, 8).toUpperCase()}`;
const asManager = (method: string, path: string, more: { body?: unknown; headers?: Record<string, string> } = {}) =>
  server.ask(method, path, { as: company.manager, ...more });

describe('a refusal', () => {
  it('is a problem with a stable code, a request id and every invalid field', async () => {
    const { status, headers, body } = await asManager('GET', '/api/pumps?limit=0&sort=colour&priority=loud');
    expect(status).toBe(400);
    expect(headers.get('Content-Type')).toBe('application/problem+json; charset=utf-8');
    const problem = Problem.parse(body);
    expect(problem).toMatchObject({ status: 400, code: 'validation', type: 'urn:millrace:problem:validation' });
    expect(problem.requestId).toBe(headers.get('X-Request-Id'));
    expect(problem.issues?.map(({ path }) => path).sort()).toEqual(['query.limit', 'query.priority', 'query.sort']);
  });

  it('names the fields of a body by themselves', async () => {
    const { body } = await asManager('POST', '/api/devices', { body: { serial: 'no', intervalSeconds: 3 } });
    expect(body.issues.map(({ path }: { path: string }) => path)).toEqual(['serial', 'intervalSeconds']);
  });

  it('says what is wrong with a body that is no JSON, too large, or missing', async () => {
    const broken = await asManager('POST', '/api/devices', { body: '{"serial":' });
    expect([broken.status, broken.body.issues]).toEqual([400, [{ path: 'body', message: 'is not JSON in UTF-8' }]]);
    const large = await asManager('POST', '/api/devices', { body: { serial: 'x'.repeat(300_000) } });
    expect([large.status, large.body.code]).toEqual([413, 'too-large']);
    const missing = await asManager('POST', '/api/devices');
    expect(missing.body.issues[0].path).toBe('serial');
  });

  it('of ours says nothing but a request id', async () => {
    const { manager, pumps } = await makeTestCompany(pools.machine);
    const { pumpId } = pumps[0]!;
    await pools.machine.query(`update pumps set settings = '{"inputs":7}' where id = $1`, [pumpId]);
    const { status, body } = await server.ask('GET', `/api/pumps/${pumpId}`, { as: manager });
    expect(status).toBe(500);
    expect(body).toEqual({
      type: 'urn:millrace:problem:internal',
      title: 'Our fault',
      status: 500,
      code: 'internal',
      detail: expect.stringContaining('request id'),
      requestId: expect.any(String),
    });
  });

  it('bears the request id of the proxy in front, if that is one', async () => {
    const given = await server.ask('GET', '/api/pumps', { headers: { 'X-Request-Id': 'proxy-12345' } });
    expect(given.body.requestId).toBe('proxy-12345');
    const crooked = await server.ask('GET', '/api/pumps', { headers: { 'X-Request-Id': 'a b' } });
    expect(crooked.body.requestId).toMatch(/^[0-9a-f-]{36}$/);
  });
});

describe('the version of the interface', () => {
  it('is said in every answer, and another one is refused', async () => {
    expect((await server.ask('GET', '/api/health')).headers.get('API-Version')).toBe('1');
    const { status, body } = await server.ask('GET', '/api/health', { headers: { 'API-Version': '2' } });
    expect([status, body.issues[0].path]).toEqual([400, 'API-Version']);
  });
});

describe('a tag', () => {
  const path = () => `/api/pumps/${company.pumps[0]!.pumpId}`;

  it('answers 304 for what the client has already, until it changes', async () => {
    const { headers } = await asManager('GET', path());
    const tag = { 'If-None-Match': headers.get('ETag')! };
    expect(headers.get('Cache-Control')).toBe('private, no-cache');
    expect((await asManager('GET', path(), { headers: tag })).status).toBe(304);
    await setState(pools.machine, company.pumps[0]!.pumpId, new Date());
    expect((await asManager('GET', path(), { headers: tag })).status).toBe(200);
  });

  it('leaves the clock out, and an answer that tells the time is not kept by a browser', async () => {
    const first = await asManager('GET', '/api/pumps');
    server.clock.now += 5_000;
    const second = await asManager('GET', '/api/pumps');
    expect(second.body.serverNow).toBe(first.body.serverNow + 5_000);
    expect(second.headers.get('ETag')).toBe(first.headers.get('ETag'));
    expect(second.headers.get('Cache-Control')).toBe('no-store');
  });

  it('must come with a change that overwrites, and refuses one made for an older version', async () => {
    const { body: device } = await asManager('POST', '/api/devices', { body: { serial: freshSerial() } });
    const change = (headers: Record<string, string>) =>
      asManager('POST', `/api/devices/${device.id}/secret`, { headers });
    expect((await change({})).body.code).toBe('precondition-required');
    expect((await change({ 'If-Match': '"7"' })).body.code).toBe('precondition-failed');
    expect((await change({ 'If-Match': 'anything' })).status).toBe(412);
    const changed = await change({ 'If-Match': `"${device.version}"` });
    expect([changed.status, changed.body.version]).toEqual([200, device.version + 1]);
    expect((await change({ 'If-Match': `"${device.version}"` })).status).toBe(412);
    expect((await change({ 'If-Match': changed.headers.get('ETag')! })).status).toBe(200);
    expect((await change({ 'If-Match': '*' })).status).toBe(200);
  });
});

describe('a repeated creation', () => {
  const create = (key: string, body: unknown, as = company.manager) =>
    server.ask('POST', '/api/devices', { as, body, headers: { 'Idempotency-Key': key } });

  it('is done once and answered alike, the secret that is shown once included', async () => {
    const [key, body] = [crypto.randomUUID(), { serial: freshSerial() }];
    const answers = await Promise.all([create(key, body), create(key, body), create(key, body)]);
    expect(answers.map(({ status }) => status)).toEqual([201, 201, 201]);
    expect(new Set(answers.map((answer) => JSON.stringify(answer.body))).size).toBe(1);
    expect(answers.filter(({ headers }) => headers.get('Idempotency-Replayed') === 'true')).toHaveLength(2);
  });

  it('is refused with another body under the same key', async () => {
    const key = crypto.randomUUID();
    await create(key, { serial: freshSerial() });
    const { status, body } = await create(key, { serial: freshSerial() });
    expect([status, body.code]).toEqual([409, 'conflict']);
  });

  it('may follow a refusal: a key is only used up by what was done', async () => {
    const key = crypto.randomUUID();
    expect((await create(key, { serial: company.pumps[0]!.serial })).status).toBe(409);
    expect((await create(key, { serial: freshSerial() })).status).toBe(201);
  });

  it("belongs to one person: another one's same key is their own", async () => {
    const { manager } = await makeTestCompany(pools.machine);
    const key = crypto.randomUUID();
    const mine = await create(key, { serial: freshSerial() });
    const theirs = await create(key, { serial: freshSerial() }, manager);
    expect([theirs.status, theirs.body.id === mine.body.id]).toEqual([201, false]);
  });

  it('is kept sealed: neither the secret nor the answer can be read in the database', async () => {
    const { body } = await create(crypto.randomUUID(), { serial: freshSerial() });
    const { rows } = await pools.machine.query("select encode(sealed_answer, 'escape') as text from idempotency_keys");
    expect(rows.filter(({ text }) => text?.includes(body.secret) || text?.includes(body.serial))).toEqual([]);
  });

  it('takes a key of 8 to 200 visible characters', async () => {
    const { body } = await create('short', { serial: freshSerial() });
    expect(body.issues[0].path).toBe('Idempotency-Key');
  });
});
