import { beforeAll, describe, expect, it } from 'vitest';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { openTestPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestServer } from '#tests/support/test-server.ts';

let server: TestServer;
let company: TestCompany;

beforeAll(async () => {
  const pools = await openTestPools();
  server = await startTestServer(pools, { publicUrl: 'https://watch.company.example' });
  company = await makeTestCompany(pools.machine);
});

/** A change with exactly these headers besides the cookie. */
const change = async (headers: Record<string, string>, withCookie = true) => {
  const answer = await fetch(`${server.url}/api/session/preferences`, {
    method: 'PATCH',
    headers: {
      'Content-Type': 'application/json',
      ...(withCookie ? { Cookie: server.cookieOf(company.manager) } : {}),
      ...headers,
    },
    body: '{"units":"si"}',
  });
  return answer.status;
};

describe('a change', () => {
  it('is taken from our own page', async () => {
    expect(await change({ 'Sec-Fetch-Site': 'same-origin' })).toBe(200);
    expect(await change({ Origin: 'https://watch.company.example' })).toBe(200);
  });

  it("is refused from another site's page, whatever cookies the browser adds", async () => {
    expect(await change({ 'Sec-Fetch-Site': 'cross-site' })).toBe(403);
    expect(await change({ 'Sec-Fetch-Site': 'same-site', Origin: 'https://watch.company.example' })).toBe(403);
    expect(await change({ Origin: 'https://evil.example' })).toBe(403);
    expect(await change({ Origin: 'null' })).toBe(403);
    expect(await change({ Origin: 'https://watch.company.example.evil.example' })).toBe(403);
  });

  it("is refused when a browser's cookie comes without a word on where from", async () => {
    expect(await change({})).toBe(403);
    expect(await change({}, false)).toBe(401);
  });

  it('does not keep another site from being linked to: reading is left alone', async () => {
    const headers = { 'Sec-Fetch-Site': 'cross-site' };
    expect((await server.ask('GET', '/api/health', { headers })).status).toBe(200);
  });
});
