import { rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { describe, expect, it, vi } from 'vitest';
import { findRunningServer } from '#server/bootstrap/cluster.mjs';
import { isStillRunning, waitUntil } from '#server/bootstrap/process-table.mjs';
import { standInProgram } from '#tests/support/stand-in-project.ts';
import { prepareStartedDemo } from '#tests/support/started-demo.ts';

vi.setConfig({ testTimeout: 120_000 });

const demo = prepareStartedDemo();

describe('a start program that is killed', () => {
  it('takes its programs with it; the next start ends the deaf one and takes the database over', async () => {
    const deaf = standInProgram().replace("process.on('disconnect'", "process.on('nothing'");
    demo.project().write('server/worker.ts', deaf);
    const killed = await demo.start();
    const children = demo.listChildren();
    await demo.stop(killed, 'SIGKILL');
    const [listening, others] = [children.filter(({ name }) => name !== 'worker'), children.slice(-1)];
    expect(await waitUntil(() => !listening.some(isStillRunning), 30_000)).toBe(true);
    expect(others.every(isStillRunning)).toBe(true);
    const server = findRunningServer(demo.databaseFolder());
    expect(server).toBeDefined();
    const next = await demo.start();
    expect(next.output()).toContain('Ended what an earlier start left running: worker');
    expect(others.some(isStillRunning)).toBe(false);
    expect(next.output()).toContain('taking it over');
    expect(findRunningServer(demo.databaseFolder())?.pid).toBe(server?.pid);
  });

  it('together with its database leaves nothing that blocks the next start', async () => {
    const killed = await demo.start();
    await demo.query('owner', 'create table kept as select 1 as one');
    killed.process.kill('SIGKILL');
    process.kill(findRunningServer(demo.databaseFolder())!.pid, 'SIGKILL');
    await killed.ended;
    await demo.start();
    expect(await demo.query('owner', 'select one from kept')).toEqual([{ one: 1 }]);
  });
});

describe('a start', () => {
  it('names a busy port and the variable that moves it', async () => {
    const squatter = createServer();
    const port = demo.project().env.MQTT_PORT;
    await new Promise<void>((done) => squatter.listen(Number(port), '127.0.0.1', done));
    const running = demo.run('start');
    expect(await running.ended).toBe(1);
    expect(running.output()).toContain(`Port ${port} cannot be opened (another program uses it)`);
    expect(running.output()).toMatch(/MQTT_PORT=\d+ npm start/);
    squatter.close();
  });

  it('is refused in the folder of another, which it leaves alone', async () => {
    await demo.start();
    const second = demo.run('start');
    expect(await second.ended).toBe(1);
    expect(second.output()).toContain(`Millrace runs already in ${demo.project().dataFolder} (process `);
    expect(demo.listChildren().every(isStillRunning)).toBe(true);
  });

  it('is refused in a folder that holds something else', async () => {
    demo.project().write('.data/letters.txt', 'not a database');
    const running = demo.run('start');
    expect(await running.ended).toBe(1);
    expect(running.output()).toContain('holds something that is not Millrace');
    rmSync(demo.project().dataFolder, { recursive: true });
  });

  it('is refused with the database of another major version of PostgreSQL, and says what to type', async () => {
    await demo.stop(await demo.start());
    demo.project().write('.data/postgres/data/PG_VERSION', '9\n');
    const running = demo.run('start');
    expect(await running.ended).toBe(1);
    expect(running.output()).toContain('was made by PostgreSQL 9; this machine has ');
    expect(running.output()).toContain('postgresql-9');
    expect(running.output()).toContain('npm run reset');
  });

  it('passes on the remedy of a program that cannot start, and stops the rest', async () => {
    const remedy = "{ type: 'failed', text: 'The schema is newer. Type: git pull' }";
    demo.project().write('server/main.ts', `process.send?.(${remedy}, () => process.exit(1)); export {};`);
    const running = demo.run('start');
    expect(await running.ended).toBe(1);
    expect(running.output()).toContain(
      'node ended with code 1 before it was ready:\nThe schema is newer. Type: git pull',
    );
  });

  it('shows the last words of a program that dies without naming a remedy', async () => {
    demo.project().write('server/worker.ts', "throw new Error('no such queue');");
    const running = demo.run('start');
    expect(await running.ended).toBe(1);
    expect(running.output()).toContain('no such queue');
  });
});

describe('a running demo', () => {
  it('starts a program and a database that die again, and says so', async () => {
    const running = await demo.start();
    const [, node] = demo.listChildren();
    process.kill(node!.pid, 'SIGKILL');
    await running.says('node was ended by SIGKILL; it starts again in 1 s');
    await running.says('node runs again.');
    expect(demo.listChildren()[1]?.pid).not.toBe(node?.pid);

    process.kill(findRunningServer(demo.databaseFolder())!.pid, 'SIGKILL');
    await running.says('PostgreSQL is gone; starting it again');
    expect(await waitUntil(() => findRunningServer(demo.databaseFolder())?.isReady === true, 60_000)).toBe(true);
  });
});
