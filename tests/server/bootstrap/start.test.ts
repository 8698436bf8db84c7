import { existsSync, statSync } from 'node:fs';
import { join } from 'node:path';
import pg from 'pg';
import { describe, expect, it, vi } from 'vitest';
import { findRunningServer } from '#server/bootstrap/cluster.mjs';
import { isStillRunning } from '#server/bootstrap/process-table.mjs';
import { standInProgram } from '#tests/support/stand-in-project.ts';
import { prepareStartedDemo, RUNNING } from '#tests/support/started-demo.ts';

vi.setConfig({ testTimeout: 120_000 });

const demo = prepareStartedDemo();

describe('a first start', () => {
  it('ends with every program running, the addresses and the people to sign in as', async () => {
    const running = await demo.start({ MILLRACE_FLEET: '1' });
    expect(demo.listChildren().map(({ name }) => name)).toEqual(['mail catcher', 'node', 'worker', 'fleet']);
    expect(demo.listChildren().every(isStillRunning)).toBe(true);
    expect(running.output()).toContain(`http://localhost:${demo.project().env.PORT}`);
    expect(running.output()).toContain('node: getting up');
    for (const person of ['manager', 'tech', 'home']) {
      expect(running.output()).toContain(`${person}@larkmoor.example`);
    }
  });

  it('makes a database that only a password opens, on loopback, whose owner is no superuser', async () => {
    await demo.start();
    const [owner] = await demo.query(
      'owner',
      `select rolsuper, rolcreaterole, current_setting('listen_addresses') as listens,
              current_setting('synchronous_commit') as sync, pg_get_userbyid(datdba) as owns
         from pg_roles, pg_database where rolname = current_user and datname = current_database()`,
    );
    expect(owner).toEqual({
      rolsuper: false,
      rolcreaterole: true,
      listens: '127.0.0.1',
      sync: 'on',
      owns: 'millrace_owner',
    });
    const [rules] = await demo.query('superuser', 'select array_agg(distinct auth_method) as m from pg_hba_file_rules');
    expect(rules?.m).toEqual(['scram-sha-256']);
    const port = Number(demo.project().env.PG_PORT);
    const guess = { host: '127.0.0.1', port, user: 'postgres', password: 'postgres', database: 'postgres' };
    await expect(new pg.Client(guess).connect()).rejects.toThrow('password authentication failed');
    expect(statSync(join(demo.project().dataFolder, 'secrets.json')).mode & 0o777).toBe(0o600);
    expect(statSync(join(demo.databaseFolder(), '../socket')).mode & 0o777).toBe(0o700);
  });
});

describe('an end', () => {
  it('stops every program, PostgreSQL last', async () => {
    const running = await demo.start({ MILLRACE_FLEET: '1' });
    const children = demo.listChildren();
    expect(await demo.stop(running, 'SIGINT')).toBe(0);
    expect(children.some(isStillRunning)).toBe(false);
    expect(findRunningServer(demo.databaseFolder())).toBeUndefined();
    const stopped = [...running.output().matchAll(/Stopping (fleet|worker|node|mail catcher|PostgreSQL)/g)];
    expect(stopped.map((match) => match[1])).toEqual(['fleet', 'worker', 'node', 'mail catcher', 'PostgreSQL']);
  });

  it('does not wait for a program that does not listen, when asked twice', async () => {
    demo.project().write('server/worker.ts', standInProgram({ onTerm: '0' }));
    const running = await demo.start();
    running.process.kill('SIGINT');
    await running.says('Stopping worker');
    const asked = performance.now();
    const impatience = setInterval(() => running.process.kill('SIGINT'), 200);
    expect(await running.ended).toBe(0);
    clearInterval(impatience);
    expect(running.output()).toContain('Hurrying.');
    // The worker's grace alone is ten seconds.
    expect(performance.now() - asked).toBeLessThan(9_500);
  });

  it('is followed by a start that goes on with the same database', async () => {
    const first = await demo.start();
    await demo.query('owner', 'create table kept as select 1 as one');
    await demo.stop(first);
    const second = await demo.start();
    expect(second.output()).not.toContain('Making a database');
    expect(await demo.query('owner', 'select one from kept')).toEqual([{ one: 1 }]);
  });
});

describe('npm start', () => {
  it.each([
    ['TERM, which npm passes on', 'SIGTERM'],
    ['the death of npm by force', 'SIGKILL'],
  ] as const)('stops everything at %s', async (_what, signal) => {
    const running = demo.runByNpm('start');
    await running.says(RUNNING);
    const children = demo.listChildren();
    running.process.kill(signal);
    // Its output closes with the last of those who write to it, the start program.
    await running.ended;
    expect(children.some(isStillRunning)).toBe(false);
    expect(findRunningServer(demo.databaseFolder())).toBeUndefined();
  });
});

describe('a reset', () => {
  it('stops what runs and deletes the database, so that the next start makes a new one', async () => {
    const first = await demo.start();
    demo.project().write('.data/demo-file.json', '{}');
    const reset = demo.run('reset');
    expect(await reset.ended).toBe(0);
    expect(await first.ended).toBe(0);
    for (const gone of ['postgres', 'secrets.json', 'demo-file.json']) {
      expect(existsSync(join(demo.project().dataFolder, gone))).toBe(false);
    }
    const second = await demo.start();
    expect(second.output()).toContain('Making a database');
  });

  it('deletes nothing in a folder that is not ours', async () => {
    demo.project().write('.data/postgres/data/precious', 'kept');
    const reset = demo.run('reset');
    expect(await reset.ended).toBe(1);
    expect(reset.output()).toContain('nothing was deleted');
    expect(existsSync(join(demo.databaseFolder(), 'precious'))).toBe(true);
  });

  it('refuses when the database is a company’s', async () => {
    const reset = demo.run('reset', { DATABASE_URL: 'postgres://somewhere/else' });
    expect(await reset.ended).toBe(1);
    expect(reset.output()).toContain('only the demo can be reset');
  });
});

describe('a company at work', () => {
  it('gets the server and the worker, and neither PostgreSQL, pumps nor a mail catcher', async () => {
    const running = demo.run('start', { DATABASE_URL: 'postgres://elsewhere/millrace', MILLRACE_FLEET: '1' });
    await running.says('Millrace is running on port');
    expect(running.output()).toContain('Starting the server');
    expect(running.output()).toContain('Starting the worker');
    expect(running.output()).not.toMatch(/mail catcher|simulated|PostgreSQL/);
    expect(existsSync(demo.project().dataFolder)).toBe(false);
  });
});
