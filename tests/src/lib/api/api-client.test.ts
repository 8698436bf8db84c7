import { afterEach, describe, expect, it, vi } from 'vitest';
import { alarmEndpoints } from '#shared/contract/http/alarms.ts';
import { deviceEndpoints } from '#shared/contract/http/devices.ts';
import { healthEndpoints } from '#shared/contract/http/health.ts';
import { pumpEndpoints } from '#shared/contract/http/pumps.ts';
import { call } from '#src/lib/api/api-client.ts';

type Sent = { readonly url: string; readonly init: RequestInit };

const json = (body: unknown, status = 200) => new Response(JSON.stringify(body), { status });
const problem = (code: string, status: number, more: object = {}) =>
  json({ type: 'about:blank', title: code, status, code, requestId: 'r-1', ...more }, status);

/** Answers calls in turn and remembers them; the last answer stays. */
function stubFetch(...answers: (() => Response)[]): Sent[] {
  const sent: Sent[] = [];
  vi.stubGlobal('fetch', async (url: string, init: RequestInit) => {
    const answer = answers[Math.min(sent.length, answers.length - 1)];
    sent.push({ url, init });
    if (answer === undefined) throw new TypeError('no network');
    return answer();
  });
  return sent;
}

const HEALTH = {
  status: 'ok',
  version: '1',
  serverNow: 1,
  parts: { database: 'ok', broker: 'ok', mail: 'ok', foldLagSeconds: null, oldestMailSeconds: null },
};
const ALARM = '00000003-0000-4000-8000-000000000001';

afterEach(() => vi.unstubAllGlobals());

describe('a call', () => {
  it('answers what the contract promises', async () => {
    stubFetch(() => json(HEALTH));
    await expect(call(healthEndpoints.read, {})).resolves.toEqual(HEALTH);
  });

  it('refuses an answer that is not of the contract, naming what is wrong with it', async () => {
    stubFetch(() => json({ ...HEALTH, version: 3 }));
    await expect(call(healthEndpoints.read, {})).rejects.toMatchObject({
      code: 'unreadable',
      issues: [{ path: 'version' }],
    });
  });

  it('carries the server’s own code, fields and request id', async () => {
    stubFetch(() => problem('validation', 400, { issues: [{ path: 'note', message: 'too long' }] }));
    await expect(call(alarmEndpoints.read, { params: { alarmId: ALARM } })).rejects.toMatchObject({
      code: 'validation',
      requestId: 'r-1',
      issues: [{ path: 'note', message: 'too long' }],
    });
  });

  it('says so when nothing answers, and when something else than the server does', async () => {
    stubFetch();
    await expect(call(healthEndpoints.read, {})).rejects.toMatchObject({ code: 'unreachable' });
    stubFetch(() => new Response('<html>bad gateway</html>', { status: 502 }));
    await expect(call(healthEndpoints.read, {})).rejects.toMatchObject({ code: 'unavailable' });
  });
});

describe('a session that has run out', () => {
  const page = {
    items: [],
    nextCursor: null,
    totals: { pumps: 0, running: 0, idle: 0, urgent: 0, soon: 0, note: 0, silent: 0 },
    matching: 0,
    areas: [],
    serverNow: 1,
  };

  it('is renewed once, silently, and the call is sent again', async () => {
    const sent = stubFetch(
      () => problem('unauthenticated', 401),
      () => json({}),
      () => json(page),
    );
    await expect(call(pumpEndpoints.list, {})).resolves.toEqual(page);
    expect(sent.map(({ url }) => url)).toEqual(['/api/pumps', '/api/session/renewal', '/api/pumps']);
  });

  it('ends in a refusal when it cannot be renewed', async () => {
    const sent = stubFetch(() => problem('unauthenticated', 401));
    await expect(call(pumpEndpoints.list, {})).rejects.toMatchObject({ code: 'unauthenticated' });
    expect(sent).toHaveLength(2);
  });

  it('is renewed once for many calls that find out together', async () => {
    let renewed = false;
    const sent: string[] = [];
    vi.stubGlobal('fetch', async (url: string) => {
      sent.push(url);
      if (url.includes('renewal')) {
        renewed = true;
        return json({});
      }
      return renewed ? json(page) : problem('unauthenticated', 401);
    });
    await Promise.all([call(pumpEndpoints.list, {}), call(pumpEndpoints.list, {}), call(pumpEndpoints.list, {})]);
    expect(sent.filter((url) => url.includes('renewal'))).toHaveLength(1);
  });
});

describe('a change', () => {
  const headersOf = ({ init }: Sent) => init.headers as Headers;

  it('sends a key for a creation, the caller’s own when it has one', async () => {
    const sent = stubFetch(() => problem('conflict', 409));
    const input = { params: { alarmId: ALARM }, body: {} };
    await call(alarmEndpoints.acknowledge, input).catch(() => undefined);
    await call(alarmEndpoints.acknowledge, { ...input, idempotencyKey: 'mine' }).catch(() => undefined);
    expect(headersOf(sent[0]!).get('Idempotency-Key')).toMatch(/^[0-9a-f-]{36}$/);
    expect(headersOf(sent[1]!).get('Idempotency-Key')).toBe('mine');
  });

  it('names the version it was made from', async () => {
    const sent = stubFetch(() => problem('precondition-failed', 412));
    await call(deviceEndpoints.revokeSecret, { params: { deviceId: ALARM }, version: 7 }).catch(() => undefined);
    expect(headersOf(sent[0]!).get('If-Match')).toBe('"7"');
  });
});
