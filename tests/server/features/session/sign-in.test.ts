import { beforeAll, describe, expect, it } from 'vitest';
import { hashPassword } from '#server/features/session/index.ts';
import { openSignInDesk, type SignInDesk } from '#tests/support/sign-in-desk.ts';
import { makeTestCompany, TEST_PASSWORD, type TestPerson } from '#tests/support/test-company.ts';
import { startTestServer } from '#tests/support/test-server.ts';

let desk: SignInDesk;
beforeAll(async () => {
  desk = await openSignInDesk();
});

describe('signing in', () => {
  it('answers who it is and hands over two cookies that no script can read', async () => {
    const { manager } = desk.company;
    const { status, body, headers } = await desk.signIn(manager);
    expect(status).toBe(201);
    expect(body.user).toMatchObject({ id: manager.userId, role: 'manager', initials: expect.stringMatching(/^M/) });
    expect(body.company.id).toBe(desk.company.companyId);
    expect(body.accessUntil - desk.server.clock.now).toBeLessThanOrEqual(600_000);
    expect(JSON.stringify(body)).not.toMatch(/hash|argon/);
    const cookies = headers.getSetCookie();
    expect(cookies.map((cookie) => cookie.split('=')[0])).toEqual(['millrace-access', 'millrace-refresh']);
    for (const cookie of cookies) expect(cookie).toMatch(/; Path=\/; .*HttpOnly; SameSite=Lax$/);
  });

  it('takes the address in any case', async () => {
    const person = { ...desk.company.manager, email: desk.company.manager.email.toUpperCase() };
    expect((await desk.signIn(person)).status).toBe(201);
  });

  it('gives its cookies the __Host- prefix and Secure over https', async () => {
    const secure = await startTestServer(desk.pools, { publicUrl: 'https://watch.company.example' });
    const body = { email: desk.company.manager.email, password: TEST_PASSWORD };
    const { headers } = await secure.ask('POST', '/api/session', { body, headers: desk.freshAddress() });
    const cookies = headers.getSetCookie();
    expect(cookies).toHaveLength(2);
    for (const cookie of cookies) {
      expect(cookie).toMatch(/^__Host-millrace-\w+=.*; Path=\/; .*HttpOnly; Secure; SameSite=Lax$/);
      expect(cookie).not.toMatch(/Domain/i);
    }
    expect(headers.get('Strict-Transport-Security')).toMatch(/max-age=31536000/);
  });

  it('answers a wrong password, an unknown address and a disabled person alike', async () => {
    const { manager: gone } = await makeTestCompany(desk.pools.machine);
    await desk.pools.machine.query('update users set disabled_at = now() where id = $1', [gone.userId]);
    const { manager } = desk.company;
    const nobody = { ...manager, email: 'nobody@company.example' };
    const answers = [await desk.signIn(manager, 'wrong'), await desk.signIn(nobody), await desk.signIn(gone)];
    for (const { status, body } of answers) {
      expect(status).toBe(401);
      expect({ ...body, requestId: '' }).toEqual({ ...answers[0]!.body, requestId: '' });
    }
    expect(await desk.listAudits(manager)).toContain('session.refused');
  });

  it('does the work of a password check for an address that nobody has', async () => {
    const time = async (person: TestPerson) => {
      const started = performance.now();
      await desk.signIn(person, 'wrong');
      return performance.now() - started;
    };
    const nobody = { ...desk.company.manager, email: 'stranger@company.example' };
    await time(nobody);
    const [known, unknown] = [await time(desk.company.technician), await time(nobody)];
    // argon2id at this cost takes tens of milliseconds; a look-up alone takes one or two.
    expect(unknown).toBeGreaterThan(known / 4);
  });

  it('refuses the password of the demo, whoever has it, unless this is the demo', async () => {
    const { neighbour } = await makeTestCompany(desk.pools.machine);
    const passwordHash = await hashPassword('millrace-demo');
    await desk.pools.machine.query('update users set password_hash = $2 where id = $1', [
      neighbour.userId,
      passwordHash,
    ]);
    expect((await desk.signIn(neighbour, 'millrace-demo')).status).toBe(401);
    const demo = await startTestServer(desk.pools, { isDemo: true });
    const body = { email: neighbour.email, password: 'millrace-demo' };
    expect((await demo.ask('POST', '/api/session', { body, headers: desk.freshAddress() })).status).toBe(201);
  });
});

describe('guessing', () => {
  it('is slowed down after five attempts from one address, with the time to wait, even for the right password', async () => {
    const { homeowner } = await makeTestCompany(desk.pools.machine);
    const address = desk.freshAddress();
    for (let attempt = 0; attempt < 5; attempt += 1) {
      expect((await desk.signIn(homeowner, 'wrong', address)).status).toBe(401);
    }
    const { status, headers, body } = await desk.signIn(homeowner, TEST_PASSWORD, address);
    expect(status).toBe(429);
    expect(Number(headers.get('Retry-After'))).toBeGreaterThan(60);
    expect(body).toMatchObject({ code: 'rate-limited', retryAfterSeconds: Number(headers.get('Retry-After')) });
    expect((await desk.signIn(homeowner)).status).toBe(201);
  });

  it('is forgotten once the password is right', async () => {
    const { homeowner } = await makeTestCompany(desk.pools.machine);
    const address = desk.freshAddress();
    for (let attempt = 0; attempt < 12; attempt += 1) {
      const isRight = attempt % 4 === 3;
      const { status } = await desk.signIn(homeowner, isRight ? TEST_PASSWORD : 'wrong', address);
      expect(status).toBe(isRight ? 201 : 401);
    }
  });
});
