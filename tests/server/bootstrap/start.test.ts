import { existsSync, readFileSync, rmSync, statSync } from 'node:fs';
import { createServer } from 'node:net';
import { join } from 'node:path';
import pg from 'pg';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { findRunningServer } from '#server/bootstrap/cluster.mjs';
import { isStillRunning, waitUntil } from '#server/bootstrap/process-table.mjs';
import {
  makeStandInProject,
  type RunningScript,
  removeStandInProject,
  type StandInProject,
  standInProgram,
} from '#tests/support/stand-in-project.ts';

const RUNNING = 'Millrace is running.';

let project: StandInProject;
let started: RunningScript[];

beforeEach(async () => {
  project = await makeStandInProject();
  started = [];
});

afterEach(async () => {
  for (const script of started) if (script.process.exitCode === null) script.process.kill('SIGTERM');
  await Promise.all(started.map((script) => script.ended));
  expect(findRunningServer(databaseFolder())).toBeUndefined();
  removeStandInProject(project);
});

const databaseFolder = () => join(project.dataFolder, 'postgres', 'data');

function run(script: string, env?: Record<string, string>): RunningScript {
  const running = project.run(script, env);
  started.push(running);
  return running;
}

async function startToTheEnd(env?: Record<string, string>): Promise<RunningScript> {
  const running = run('start', env);
  await running.says(RUNNING);
  return running;
}

async function stop(running: RunningScript, signal: NodeJS.Signals = 'SIGTERM'): Promise<number | null> {
  running.process.kill(signal);
  return running.ended;
}

function recordedChildren(): { name: string; pid: number; started: string }[] {
  return JSON.parse(readFileSync(join(project.dataFolder, 'children.json'), 'utf8'));
}

const secrets = () => JSON.parse(readFileSync(join(project.dataFolder, 'secrets.json'), 'utf8'));

function connectAs(role: 'owner' | 'superuser'): pg.Client {
  const [user, password] =
    role === 'owner' ? ['millrace_owner', secrets().ownerPassword] : ['postgres', secrets().superuserPassword];
  const database = role === 'owner' ? 'millrace' : 'postgres';
  return new pg.Client({ host: '127.0.0.1', port: Number(project.env.PG_PORT), user, password, database });
}

async function askOnce(role: 'owner' | 'superuser', statement: string): Promise<Record<string, unknown>[]> {
  const client = connectAs(role);
  await client.connect();
  try {
    return (await client.query(statement)).rows;
  } finally {
    await client.end();
  }
}

describe('a first start', () => {
  it('ends with every program running, the addresses and the people to sign in as', async () => {
    const running = await startToTheEnd();
    expect(recordedChildren().map(({ name }) => name)).toEqual(['mail catcher', 'node', 'worker', 'fleet']);
    expect(recordedChildren().every(isStillRunning)).toBe(true);
    expect(running.output()).toContain(`http://localhost:${project.env.PORT}`);
    expect(running.output()).toContain('node: getting up');
    for (const person of ['manager', 'tech', 'home']) {
      expect(running.output()).toContain(`${person}@larkmoor.example`);
    }
  });

  it('makes a database that only a password opens, on loopback, whose owner is no superuser', async () => {
    await startToTheEnd();
    const [owner] = await askOnce(
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
    const stranger = new pg.Client({
      host: '127.0.0.1',
      port: Number(project.env.PG_PORT),
      user: 'postgres',
      password: 'postgres',
      database: 'postgres',
    });
    await expect(stranger.connect()).rejects.toThrow('password authentication failed');
    const [rules] = await askOnce('superuser', 'select array_agg(distinct auth_method) as m from pg_hba_file_rules');
    expect(rules?.m).toEqual(['scram-sha-256']);
    expect(statSync(join(project.dataFolder, 'secrets.json')).mode & 0o777).toBe(0o600);
    expect(statSync(join(databaseFolder(), '../socket')).mode & 0o777).toBe(0o700);
  });
});

describe('an end', () => {
  it.each(['SIGINT', 'SIGTERM', 'SIGHUP'] as const)('on %s stops every program, PostgreSQL last', async (signal) => {
    const running = await startToTheEnd();
    const children = recordedChildren();
    expect(await stop(running, signal)).toBe(0);
    expect(children.some(isStillRunning)).toBe(false);
    expect(findRunningServer(databaseFolder())).toBeUndefined();
    const stopped = [...running.output().matchAll(/Stopping (fleet|worker|node|mail catcher|PostgreSQL)/g)];
    expect(stopped.map((match) => match[1])).toEqual(['fleet', 'worker', 'node', 'mail catcher', 'PostgreSQL']);
  });

  it('comes at once for a program that does not listen, when asked twice', async () => {
    project.write('server/worker.ts', standInProgram({ onTerm: '0' }));
    const running = await startToTheEnd();
    running.process.kill('SIGINT');
    await running.says('Stopping worker');
    const asked = performance.now();
    const impatience = setInterval(() => running.process.kill('SIGINT'), 200);
    expect(await running.ended).toBe(0);
    clearInterval(impatience);
    expect(running.output()).toContain('Hurrying.');
    // Its grace alone is ten seconds.
    expect(performance.now() - asked).toBeLessThan(8_000);
    expect(findRunningServer(databaseFolder())).toBeUndefined();
  });

  it('is followed by a start that goes on with the same database', async () => {
    await stop(await startToTheEnd());
    await startToTheEnd().then(() => askOnce('owner', 'create table kept (one int)'));
    await stop(started.at(-1)!);
    const third = await startToTheEnd();
    expect(third.output()).not.toContain('Making a database');
    expect(await askOnce('owner', 'select count(*)::int as rows from kept')).toEqual([{ rows: 0 }]);
  });
});

describe('npm start', () => {
  it.each([
    ['TERM, which npm passes on', 'SIGTERM'],
    ['the death of npm by force', 'SIGKILL'],
  ] as const)('stops everything at %s', async (_what, signal) => {
    const running = project.runByNpm('start');
    started.push(running);
    await running.says(RUNNING);
    const children = recordedChildren();
    running.process.kill(signal);
    // Its output closes with the last of those who write to it, the start program.
    await running.ended;
    expect(children.some(isStillRunning)).toBe(false);
    expect(findRunningServer(databaseFolder())).toBeUndefined();
  });
});

describe('a start program that is killed', () => {
  it('takes its programs with it and leaves a database that the next start takes over', async () => {
    const killed = await startToTheEnd();
    const children = recordedChildren();
    killed.process.kill('SIGKILL');
    await killed.ended;
    expect(await waitUntil(() => !children.some(isStillRunning), 10_000)).toBe(true);
    const server = findRunningServer(databaseFolder());
    expect(server).toBeDefined();
    const next = await startToTheEnd();
    expect(next.output()).toContain('taking it over');
    expect(findRunningServer(databaseFolder())?.pid).toBe(server?.pid);
  });

  it('has programs that do not notice ended by the next start', async () => {
    project.write('server/worker.ts', standInProgram().replace("process.on('disconnect'", "process.on('nothing'"));
    const killed = await startToTheEnd();
    killed.process.kill('SIGKILL');
    await killed.ended;
    const next = await startToTheEnd();
    expect(next.output()).toContain('Ended what an earlier start left running: ');
    expect(next.output()).toContain('worker');
  });

  it('together with its database leaves nothing that blocks the next start', async () => {
    const killed = await startToTheEnd();
    await askOnce('owner', 'create table kept as select 1 as one');
    killed.process.kill('SIGKILL');
    process.kill(findRunningServer(databaseFolder())!.pid, 'SIGKILL');
    await killed.ended;
    await startToTheEnd();
    expect(await askOnce('owner', 'select one from kept')).toEqual([{ one: 1 }]);
  });
});

describe('trouble', () => {
  it('names a busy port and the variable that moves it', async () => {
    const squatter = createServer();
    await new Promise<void>((done) => squatter.listen(Number(project.env.MQTT_PORT), '127.0.0.1', done));
    const running = run('start');
    expect(await running.ended).toBe(1);
    expect(running.output()).toContain(`Port ${project.env.MQTT_PORT} cannot be opened (another program uses it)`);
    expect(running.output()).toMatch(/MQTT_PORT=\d+ npm start/);
    squatter.close();
  });

  it('refuses a second start in the same folder and leaves the first alone', async () => {
    await startToTheEnd();
    const second = run('start');
    expect(await second.ended).toBe(1);
    expect(second.output()).toContain(`Millrace runs already in ${project.dataFolder} (process `);
    expect(recordedChildren().every(isStillRunning)).toBe(true);
  });

  it('refuses a folder that holds something else', async () => {
    project.write('.data/letters.txt', 'not a database');
    const running = run('start');
    expect(await running.ended).toBe(1);
    expect(running.output()).toContain('holds something that is not Millrace');
    rmSync(project.dataFolder, { recursive: true });
  });

  it('refuses a database that another major version of PostgreSQL made, and says what to type', async () => {
    await stop(await startToTheEnd());
    project.write('.data/postgres/data/PG_VERSION', '9\n');
    const running = run('start');
    expect(await running.ended).toBe(1);
    expect(running.output()).toContain('was made by PostgreSQL 9; this machine has ');
    expect(running.output()).toContain('postgresql-9');
    expect(running.output()).toContain('npm run reset');
  });

  it('passes on the remedy of a program that cannot start, and stops the rest', async () => {
    project.write(
      'server/main.ts',
      "process.send?.({ type: 'failed', text: 'The schema is newer. Type: git pull' }); setTimeout(() => process.exit(1), 50); export {};",
    );
    const running = run('start');
    expect(await running.ended).toBe(1);
    expect(running.output()).toContain(
      'node ended with code 1 before it was ready:\nThe schema is newer. Type: git pull',
    );
  });

  it('shows the last words of a program that dies at the start without naming a remedy', async () => {
    project.write('server/worker.ts', "throw new Error('no such queue');");
    const running = run('start');
    expect(await running.ended).toBe(1);
    expect(running.output()).toContain('no such queue');
  });

  it('starts a program that dies again, and says so', async () => {
    const running = await startToTheEnd();
    const [, node] = recordedChildren();
    process.kill(node!.pid, 'SIGKILL');
    await running.says('node was ended by SIGKILL; it starts again in 1 s');
    await running.says('node runs again.');
    expect(recordedChildren()[1]?.pid).not.toBe(node?.pid);
  });

  it('starts a database that dies again, and says so', async () => {
    const running = await startToTheEnd();
    process.kill(findRunningServer(databaseFolder())!.pid, 'SIGKILL');
    await running.says('PostgreSQL is gone; starting it again');
    expect(await waitUntil(() => findRunningServer(databaseFolder())?.isReady === true, 20_000)).toBe(true);
  });
});

describe('a reset', () => {
  it('stops what runs and deletes the database, so that the next start makes a new one', async () => {
    const first = await startToTheEnd();
    const reset = run('reset');
    expect(await reset.ended).toBe(0);
    expect(await first.ended).toBe(0);
    expect(existsSync(databaseFolder())).toBe(false);
    const second = await startToTheEnd();
    expect(second.output()).toContain('Making a database');
  });

  it('deletes nothing in a folder that is not ours', async () => {
    project.write('.data/postgres/data/precious', 'kept');
    const reset = run('reset');
    expect(await reset.ended).toBe(1);
    expect(reset.output()).toContain('nothing was deleted');
    expect(existsSync(join(databaseFolder(), 'precious'))).toBe(true);
  });

  it('refuses when the database is a company’s', async () => {
    const reset = run('reset', { DATABASE_URL: 'postgres://somewhere/else' });
    expect(await reset.ended).toBe(1);
    expect(reset.output()).toContain('only the demo can be reset');
  });
});

describe('a company at work', () => {
  it('gets the server and the worker, and neither PostgreSQL, pumps nor a mail catcher', async () => {
    const running = run('start', { DATABASE_URL: 'postgres://elsewhere/millrace' });
    await running.says('Millrace is running on port');
    expect(running.output()).toContain('Starting the server');
    expect(running.output()).toContain('Starting the worker');
    expect(running.output()).not.toMatch(/mail catcher|simulated|PostgreSQL/);
    expect(existsSync(project.dataFolder)).toBe(false);
  });
});
