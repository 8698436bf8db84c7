import { readFile } from 'node:fs/promises';
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { extname, join, normalize } from 'node:path';
import { WebSocketServer } from 'ws';
import { ERROR_STATUS, type ErrorCode, PROBLEM_MEDIA_TYPE } from '#shared/contract/errors.ts';
import { LIVE_PATH } from '#shared/contract/socket/frames.ts';
import { FakeRefusal } from './fake-handler.ts';
import { FAKE_HANDLERS } from './fake-handlers.ts';
import type { FakeState } from './fake-state.ts';

export type FakeServer = { readonly url: string; readonly close: () => Promise<void> };

/** What the real server sends with the page: no inline script, no eval, nothing from elsewhere. */
const POLICY =
  "default-src 'self'; script-src 'self'; style-src 'self'; img-src 'self'; font-src 'self'; connect-src 'self'; object-src 'none'; base-uri 'self'; form-action 'self'; frame-ancestors 'none'";

const TYPES: Readonly<Record<string, string>> = {
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.svg': 'image/svg+xml',
  '.woff2': 'font/woff2',
};

async function readBody(request: IncomingMessage): Promise<unknown> {
  const chunks: Buffer[] = [];
  for await (const chunk of request) chunks.push(chunk as Buffer);
  return chunks.length === 0 ? undefined : JSON.parse(Buffer.concat(chunks).toString());
}

function refuse(response: ServerResponse, code: ErrorCode, retryAfterSeconds: number): void {
  const status = ERROR_STATUS[code];
  response.writeHead(status, { 'Content-Type': PROBLEM_MEDIA_TYPE });
  response.end(
    JSON.stringify({
      type: 'about:blank',
      title: code,
      status,
      code,
      requestId: 'fake-request',
      ...(code === 'rate-limited' ? { retryAfterSeconds } : {}),
    }),
  );
}

const matchPath = (pattern: string, path: string): Record<string, string> | undefined => {
  const names = [...pattern.matchAll(/:(\w+)/g)].map((match) => match[1] ?? '');
  const found = new RegExp(`^${pattern.replaceAll(/:\w+/g, '([^/]+)')}$`).exec(path);
  return found === null ? undefined : Object.fromEntries(names.map((name, index) => [name, found[index + 1] ?? '']));
};

async function answerApi(
  state: FakeState,
  request: IncomingMessage,
  response: ServerResponse,
  url: URL,
): Promise<void> {
  const { pathname } = url;
  state.calls.push(`${request.method} ${pathname}${url.search}`);
  const failure = state.failures.get(pathname) ?? state.failures.get(`${request.method} ${pathname}`);
  if (failure === 'hang') return;
  if (failure !== undefined) return refuse(response, failure, state.retryAfterSeconds);
  for (const { endpoint, answer } of FAKE_HANDLERS) {
    const params = endpoint.method === request.method ? matchPath(endpoint.path, pathname) : undefined;
    if (params === undefined) continue;
    if (endpoint.roles !== 'public' && state.role === undefined) return refuse(response, 'unauthenticated', 0);
    const query = endpoint.query?.safeParse(Object.fromEntries(url.searchParams));
    const body = endpoint.body?.safeParse(await readBody(request));
    if (query?.success === false || body?.success === false) return refuse(response, 'validation', 0);
    const version = /^"(\d+)"$/.exec(request.headers['if-match'] ?? '')?.[1];
    const ifMatch = version === undefined ? undefined : Number(version);
    const input = { params, query: query?.data ?? {}, body: body?.data, ifMatch };
    const result = answer(state, input as never);
    response.writeHead(endpoint.status ?? 200, { 'Content-Type': 'application/json' });
    response.end(endpoint.status === 204 ? undefined : JSON.stringify(endpoint.response.parse(result)));
    return;
  }
  refuse(response, 'not-found', 0);
}

async function answerPage(folder: string, response: ServerResponse, pathname: string): Promise<void> {
  const file = extname(pathname) === '' ? 'index.html' : normalize(pathname);
  const content = await readFile(join(folder, file)).catch(() => undefined);
  response.writeHead(content === undefined ? 404 : 200, {
    'Content-Type': TYPES[extname(file)] ?? 'application/octet-stream',
    'Content-Security-Policy': POLICY,
  });
  response.end(content);
}

/** Serves the built client and a network of its own making, answer for answer by the contract. */
export async function startFakeServer(state: FakeState, clientFolder: string, port = 0): Promise<FakeServer> {
  const server = createServer((request, response) => {
    const url = new URL(request.url ?? '/', 'http://localhost');
    const answer = url.pathname.startsWith('/api/')
      ? answerApi(state, request, response, url)
      : answerPage(clientFolder, response, url.pathname);
    answer.catch((error: unknown) => refuse(response, error instanceof FakeRefusal ? error.code : 'internal', 0));
  });
  const sockets = new WebSocketServer({ server, path: LIVE_PATH });
  sockets.on('connection', (socket) => {
    state.sockets.add(socket);
    socket.on('close', () => state.sockets.delete(socket));
    socket.send(JSON.stringify({ type: 'hello', serverNow: state.now(), cursor: String(state.cursor) }));
  });
  const beat = setInterval(() => {
    for (const socket of state.sockets)
      socket.send(JSON.stringify({ type: 'heartbeat', serverNow: state.now(), cursor: String(state.cursor) }));
  }, 10_000);
  await new Promise<void>((resolve) => server.listen(port, '127.0.0.1', resolve));
  const address = server.address() as AddressInfo;
  return {
    url: `http://127.0.0.1:${address.port}`,
    close: async () => {
      clearInterval(beat);
      for (const socket of state.sockets) socket.terminate();
      sockets.close();
      server.closeAllConnections();
      await new Promise((resolve) => server.close(resolve));
    },
  };
}
