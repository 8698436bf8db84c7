import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtemp, rm } from 'node:fs/promises';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findFreePort } from '#tests/support/free-port.ts';
import { createFreshDatabase } from '#tests/support/test-database.ts';

const project = fileURLToPath(new URL('../..', import.meta.url));

let database: Awaited<ReturnType<typeof createFreshDatabase>>;
let dataFolder: string;
let env: Record<string, string>;
const children: ChildProcess[] = [];

beforeAll(async () => {
  database = await createFreshDatabase({ migrated: false });
  dataFolder = await mkdtemp(join(tmpdir(), 'millrace-main-'));
  env = {
    PATH: process.env.PATH ?? '',
    DATABASE_URL: database.databaseUrl,
    SMTP_URL: 'smtp://127.0.0.1:9',
    PORT: String(await findFreePort()),
    MQTT_PORT: String(await findFreePort()),
    PUBLIC_URL: 'https://watch.company.example',
    TOKEN_KEY: 't'.repeat(32),
    DEVICE_KEY: 'd'.repeat(32),
    MILLRACE_DATA: dataFolder,
    LOG_LEVEL: 'silent',
  };
});
afterAll(async () => {
  for (const child of children) child.kill('SIGKILL');
  await database.drop();
  await rm(dataFolder, { recursive: true, force: true });
});

type Message = { readonly type: 'progress' | 'ready' | 'failed'; readonly text?: string };

/** The server as the start program spawns it; resolves with its last word: ready or failed. */
const start = async (more: Record<string, string> = {}) => {
  const args = ['--import', 'tsx', 'server/main.ts'];
  const stdio = ['ignore', 'ignore', 'ignore', 'ipc'] as const;
  const child: ChildProcess = spawn(process.execPath, args, {
    cwd: project,
    env: { ...env, ...more },
    stdio: [...stdio],
  });
  children.push(child);
  const said: Message[] = [];
  const settled = new Promise<Message>((resolve) => {
    child.on('message', (message: Message) => {
      said.push(message);
      if (message.type !== 'progress') resolve(message);
    });
  });
  const ended = once(child, 'exit');
  return { child, said, settled: await settled, ended };
};

// Five starts of a real process, each of which compiles the server first.
describe('the server process', { timeout: 120_000 }, () => {
  it('tells its start program how far it has come, works, and ends in order when asked', async () => {
    const { child, said, settled, ended } = await start();
    expect(settled).toEqual({ type: 'ready' });
    expect(said[0]).toEqual({ type: 'progress', text: expect.stringMatching(/Bringing the database up to date/) });
    const health = await (await fetch(`http://127.0.0.1:${env.PORT}/api/health`)).json();
    expect(health.parts).toMatchObject({ database: 'ok', broker: 'ok' });
    child.kill('SIGTERM');
    expect((await ended)[0]).toBe(0);
  });

  it('ends when its start program is gone', async () => {
    const { child, ended } = await start();
    child.disconnect();
    expect((await ended)[0]).toBe(0);
  });

  it('says every fault of its settings and ends', async () => {
    const { settled, ended } = await start({ TOKEN_KEY: 'short', SMTP_URL: 'nowhere' });
    expect(settled).toEqual({ type: 'failed', text: expect.stringMatching(/SMTP_URL.*\n.*TOKEN_KEY/) });
    expect((await ended)[0]).toBe(1);
  });

  it('names the variable of a port that is taken', async () => {
    const squatter = createServer().listen(Number(env.PORT), '127.0.0.1');
    await once(squatter, 'listening');
    const { settled, ended } = await start();
    squatter.close();
    expect(settled.text).toMatch(new RegExp(`Port ${env.PORT}.*PORT=`));
    expect((await ended)[0]).toBe(1);
  });

  it('refuses a database of a newer version with the remedy', async () => {
    const client = new pg.Client({ connectionString: database.databaseUrl });
    await client.connect();
    await client.query("insert into drizzle.__drizzle_migrations (hash, created_at) values ('later', 9999999999999)");
    const { settled, ended } = await start();
    expect(settled.text).toMatch(/newer Millrace.*npm run reset/s);
    expect((await ended)[0]).toBe(1);
    await client.end();
  });
});
