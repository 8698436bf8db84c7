import { appendFileSync, existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createCluster, findRunningServer } from '#server/bootstrap/cluster.mjs';
import { type OwnPostgres, startOwnPostgres } from '#tests/support/own-postgres.ts';

let postgres: OwnPostgres;

beforeAll(async () => {
  postgres = await startOwnPostgres({ durable: true });
});
afterAll(() => postgres.dispose());

async function query(statement: string): Promise<unknown[]> {
  const client = new pg.Client({ connectionString: postgres.superuserUrl });
  await client.connect();
  try {
    return (await client.query(statement)).rows;
  } finally {
    await client.end();
  }
}

describe('a cluster of our own', () => {
  it('keeps every committed row when it is killed, and starts again', async () => {
    await query('create table kept as select 1 as one');
    await postgres.killHard();
    expect(postgres.findPid()).toBeUndefined();
    await postgres.start();
    expect(await query('select one from kept')).toEqual([{ one: 1 }]);
  });

  it('starts although the lock file names a living stranger', async () => {
    await postgres.killHard();
    const file = join(postgres.folder, 'postmaster.pid');
    const [, ...rest] = readFileSync(file, 'utf8').split('\n');
    writeFileSync(file, [process.pid, ...rest].join('\n'));
    expect(findRunningServer(postgres.folder)).toBeUndefined();
    await postgres.start();
    expect(await query('select 1 as one')).toEqual([{ one: 1 }]);
  });

  it('says what PostgreSQL said when it does not start', async () => {
    await postgres.stop();
    const file = join(postgres.folder, 'postgresql.conf');
    const good = readFileSync(file, 'utf8');
    appendFileSync(file, '\nno_such_setting = 1\n');
    await expect(postgres.start()).rejects.toThrow(/did not start.*no_such_setting/s);
    writeFileSync(file, good);
    await postgres.start();
  });
});

describe('createCluster', () => {
  it('leaves nothing in its place when it fails', async () => {
    const folder = join(dirname(postgres.folder), 'other');
    const cluster = { programs: '/nowhere', folder, socketFolder: '', logFile: '', account: undefined };
    mkdirSync(`${folder}.new`);
    writeFileSync(`${folder}.new/half`, 'what an interrupted attempt left');
    await expect(createCluster(cluster, { superuserPassword: 'x', settings: [] })).rejects.toThrow('data folder');
    expect(existsSync(folder)).toBe(false);
    expect(existsSync(`${folder}.password`)).toBe(false);
    expect(existsSync(`${folder}.new`)).toBe(false);
  });
});
