import jwt from 'jsonwebtoken';
import { afterEach, beforeAll, describe, expect, it } from 'vitest';
import { REUSE_WINDOW_MS } from '#server/features/session/refresh-token.ts';
import { openSignInDesk, type SignInDesk } from '#tests/support/sign-in-desk.ts';
import { makeTestCompany } from '#tests/support/test-company.ts';
import { TEST_TOKEN_KEY } from '#tests/support/test-server.ts';

const RENEWAL = '/api/session/renewal';
const DAY_MS = 86_400_000;

let desk: SignInDesk;
beforeAll(async () => {
  desk = await openSignInDesk();
});
afterEach(() => {
  desk.server.clock.now = Date.now();
});

describe('an access token', () => {
  it('opens the API for ten minutes', async () => {
    const { technician } = desk.company;
    const jar = await desk.signInto(technician);
    expect((await desk.askWith(jar, 'GET', '/api/session')).body.user.id).toBe(technician.userId);
    desk.server.clock.now += 601_000;
    expect((await desk.askWith(jar, 'GET', '/api/session')).status).toBe(401);
  });

  it('is refused when another key, another algorithm, another audience or nobody signed it', async () => {
    const good = (await desk.signInto(desk.company.technician)).find('millrace-access')!;
    const claims = jwt.decode(good) as Record<string, unknown>;
    const forged = [
      jwt.sign(claims, 'another key of sufficient length, forty bytes'),
      jwt.sign(claims, TEST_TOKEN_KEY, { algorithm: 'HS512' }),
      jwt.sign(claims, '', { algorithm: 'none' }),
      jwt.sign({ ...claims, aud: 'another' }, TEST_TOKEN_KEY),
      jwt.sign({ ...claims, iss: 'another' }, TEST_TOKEN_KEY),
      jwt.sign({ ...claims, rol: 'owner' }, TEST_TOKEN_KEY),
      `${good.slice(0, -2)}xx`,
      'no token',
    ];
    const ask = async (token: string) =>
      (await desk.server.ask('GET', '/api/session', { headers: { Cookie: `millrace-access=${token}` } })).status;
    for (const token of forged) expect(await ask(token)).toBe(401);
    expect(await ask(good)).toBe(200);
  });
});

describe('renewing', () => {
  it('changes both cookies and keeps the person signed in', async () => {
    const jar = await desk.signInto(desk.company.manager);
    const before = jar.find('millrace-refresh');
    desk.server.clock.now += 1_000;
    expect((await desk.askWith(jar, 'POST', RENEWAL)).status).toBe(200);
    expect(jar.find('millrace-refresh')).not.toBe(before);
    expect((await desk.askWith(jar, 'GET', '/api/session')).status).toBe(200);
    expect((await desk.askWith(jar, 'POST', RENEWAL)).status).toBe(200);
  });

  it('gives tabs that renew at once the same token', async () => {
    const jar = await desk.signInto(desk.company.manager);
    const tabs = [jar.copy(), jar.copy(), jar.copy()];
    const answers = await Promise.all(tabs.map((tab) => desk.askWith(tab, 'POST', RENEWAL)));
    expect(answers.map(({ status }) => status)).toEqual([200, 200, 200]);
    expect(new Set(tabs.map((tab) => tab.find('millrace-refresh'))).size).toBe(1);
    expect((await desk.askWith(tabs[2]!, 'POST', RENEWAL)).status).toBe(200);
  });

  it('ends the whole session when a used token comes again after ten seconds, and writes it down', async () => {
    const { manager } = await makeTestCompany(desk.pools.machine);
    const jar = await desk.signInto(manager);
    const stolen = jar.copy();
    await desk.askWith(jar, 'POST', RENEWAL);
    desk.server.clock.now += REUSE_WINDOW_MS + 1;
    expect((await desk.askWith(stolen, 'POST', RENEWAL)).status).toBe(401);
    expect(stolen.find('millrace-refresh')).toBeUndefined();
    expect((await desk.askWith(jar, 'GET', '/api/session')).status).toBe(401);
    expect((await desk.askWith(jar, 'POST', RENEWAL)).status).toBe(401);
    expect(await desk.listAudits(manager)).toEqual(['session.created', 'session.replayed']);
  });

  it('is refused after two weeks without use, and after ninety days with it', async () => {
    const { manager } = desk.company;
    const [idle, busy] = [await desk.signInto(manager), await desk.signInto(manager)];
    const start = desk.server.clock.now;
    for (let day = 0; day < 90; day += 10) {
      desk.server.clock.now = start + day * DAY_MS;
      expect((await desk.askWith(busy, 'POST', RENEWAL)).status).toBe(200);
    }
    desk.server.clock.now = start + 90 * DAY_MS;
    expect((await desk.askWith(busy, 'POST', RENEWAL)).status).toBe(401);
    desk.server.clock.now = start + 15 * DAY_MS;
    expect((await desk.askWith(idle, 'POST', RENEWAL)).status).toBe(401);
  });

  it('is refused without a cookie, with a made-up token, and for a person who was disabled meanwhile', async () => {
    expect((await desk.server.ask('POST', RENEWAL)).status).toBe(401);
    const madeUp = { headers: { Cookie: `millrace-refresh=${'x'.repeat(43)}` } };
    expect((await desk.server.ask('POST', RENEWAL, madeUp)).status).toBe(401);
    const { manager } = await makeTestCompany(desk.pools.machine);
    const jar = await desk.signInto(manager);
    await desk.pools.machine.query('update users set disabled_at = now() where id = $1', [manager.userId]);
    expect((await desk.askWith(jar, 'POST', RENEWAL)).status).toBe(401);
  });

  it('keeps no token in the database as it is', async () => {
    const token = (await desk.signInto(desk.company.manager)).find('millrace-refresh')!;
    const { rows } = await desk.pools.machine.query('select row_to_json(t)::text as text from refresh_tokens t');
    expect(rows.length).toBeGreaterThan(0);
    const bytes = [token, Buffer.from(token).toString('hex'), Buffer.from(token, 'base64url').toString('hex')];
    expect(rows.filter(({ text }) => bytes.some((form) => text.includes(form)))).toEqual([]);
  });
});

describe('signing out', () => {
  it('ends the session at once for every tab, copies of the cookies included', async () => {
    const jar = await desk.signInto(desk.company.manager);
    const copy = jar.copy();
    const { status, body } = await desk.askWith(jar, 'DELETE', '/api/session');
    expect([status, body]).toEqual([204, '']);
    expect(jar.header()).toEqual({});
    expect((await desk.askWith(copy, 'GET', '/api/session')).status).toBe(401);
    expect((await desk.askWith(copy, 'POST', RENEWAL)).status).toBe(401);
  });

  it('leaves other sessions of the same person alone', async () => {
    const { manager } = desk.company;
    const [here, there] = [await desk.signInto(manager), await desk.signInto(manager)];
    await desk.askWith(here, 'DELETE', '/api/session');
    expect((await desk.askWith(there, 'GET', '/api/session')).status).toBe(200);
  });

  it('is no fault without a session', async () => {
    expect((await desk.server.ask('DELETE', '/api/session')).status).toBe(204);
  });
});
