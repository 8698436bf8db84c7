import { once } from 'node:events';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { pino } from 'pino';
import { afterAll } from 'vitest';
import { createContainer, type WatchState } from '#server/container.ts';
import { newId } from '#server/db/new-id.ts';
import type { Pools } from '#server/db/pools.ts';
import { signAccessToken } from '#server/features/session/access-token.ts';
import { TEST_DEVICE_KEY, type TestPerson } from '#tests/support/test-company.ts';

export const TEST_TOKEN_KEY = 'token-key-only-for-tests-0123456789abcdef';

type Asked = {
  readonly as?: TestPerson | undefined;
  readonly body?: unknown;
  readonly headers?: Record<string, string>;
};

export type TestAnswer = {
  readonly status: number;
  readonly headers: Headers;
  /** Parsed JSON, or the text where it is none. */
  // biome-ignore lint/suspicious/noExplicitAny: a test looks into whatever came
  readonly body: any;
};

export type TestServer = {
  readonly url: string;
  /** The clock of the server, to be moved by tests. */
  readonly clock: { now: number };
  readonly watch: { isBrokerUp: boolean; foldLagSeconds: number | undefined };
  readonly ask: (method: string, path: string, asked?: Asked) => Promise<TestAnswer>;
  /** A cookie header as the browser of somebody who has signed in sends it. */
  readonly cookieOf: (person: TestPerson, sessionId?: string) => string;
};

type Options = { readonly publicUrl?: string; readonly isDemo?: boolean; readonly clientFolder?: string };

/** The whole HTTP side on a free port, every answer held against the contract; closed after the file's last test. */
export async function startTestServer(pools: Pools, options: Options = {}): Promise<TestServer> {
  const clock = { now: Date.now() };
  const watch: TestServer['watch'] = { isBrokerUp: true, foldLagSeconds: 0 };
  const state: WatchState = { isBrokerUp: () => watch.isBrokerUp, findFoldLagSeconds: () => watch.foldLagSeconds };
  const server = createServer((request, response) => app(request, response));
  server.listen(0, '127.0.0.1');
  await once(server, 'listening');
  const url = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  const { publicUrl = url, isDemo = false, clientFolder } = options;
  const { app } = createContainer({
    env: {
      publicUrl,
      tokenKey: TEST_TOKEN_KEY,
      deviceKey: TEST_DEVICE_KEY,
      isDemo,
      checksAnswers: true,
      http: { trustedProxies: 1 },
    },
    pools,
    log: pino({ level: 'silent' }),
    now: () => clock.now,
    watch: state,
    ...(clientFolder === undefined ? {} : { clientFolder }),
  });
  afterAll(() => {
    server.closeAllConnections();
    server.close();
  });
  const prefix = publicUrl.startsWith('https:') ? '__Host-' : '';
  const cookieOf = ({ sight, email }: TestPerson, sessionId = newId()) => {
    const actor = { ...sight, name: email, sessionId };
    return `${prefix}millrace-access=${signAccessToken(TEST_TOKEN_KEY, actor, clock.now).token}`;
  };
  const ask = async (method: string, path: string, { as, body, headers = {} }: Asked = {}): Promise<TestAnswer> => {
    const answer = await fetch(`${url}${path}`, {
      method,
      redirect: 'manual',
      headers: {
        'Sec-Fetch-Site': 'same-origin',
        ...(as === undefined ? {} : { Cookie: cookieOf(as) }),
        ...(body === undefined ? {} : { 'Content-Type': 'application/json' }),
        ...headers,
      },
      ...(body === undefined ? {} : { body: typeof body === 'string' ? body : JSON.stringify(body) }),
    });
    const text = await answer.text();
    const isJson = /json/.test(answer.headers.get('Content-Type') ?? '');
    return { status: answer.status, headers: answer.headers, body: isJson ? JSON.parse(text) : text };
  };
  return { url, clock, watch, ask, cookieOf };
}
