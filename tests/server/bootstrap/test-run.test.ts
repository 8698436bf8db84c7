import { cpSync, existsSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { beforeEach, describe, expect, it } from 'vitest';
import { listMarkedProcesses } from '#server/bootstrap/marked-processes.mjs';
import { makeStandInProject, type RunningScript, type StandInProject } from '#tests/support/stand-in-project.ts';

let project: StandInProject;

beforeEach(async () => {
  project = await makeStandInProject();
  cpSync(resolve('tests/support'), join(project.folder, 'tests/support'), { recursive: true });
  project.write('vite.config.ts', "export default { test: { include: ['tests/shared/**/*.test.ts'] } };");
});

const writeTest = (name: string, body: string) =>
  project.write(
    `tests/shared/${name}.test.ts`,
    `import { spawn } from 'node:child_process';
import { writeFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { startOwnPostgres } from '#tests/support/own-postgres.ts';
writeFileSync('run-folder', process.env.MILLRACE_TEST_RUN ?? '');
${body}`,
  );

const runTests = () => project.run('test', {}, ['tests/shared']);
const lastLine = (running: RunningScript) => running.standardOutput().trimEnd().split('\n').at(-1);

/** Where the run kept what it made: written down by the first test that ran. */
const runFolder = () => readFileSync(join(project.folder, 'run-folder'), 'utf8');

function expectNothingLeft(): void {
  expect(runFolder()).toContain('millrace-tests-');
  expect(existsSync(runFolder())).toBe(false);
  expect(listMarkedProcesses(`MILLRACE_TEST_RUN=${runFolder()}`)).toEqual([]);
}

describe('npm test', () => {
  it('counts what passed and what failed on its last line, and fails when something did', async () => {
    writeTest('both', "it('holds', () => {}); it('does not', () => { expect(1).toBe(2); });");
    const running = runTests();
    expect(await running.ended).toBe(1);
    expect(lastLine(running)).toBe('1 passed, 1 failed');
    expectNothingLeft();
  });

  it('passes when everything did', async () => {
    writeTest('good', "it('holds', () => {}); it('holds as well', () => {});");
    const running = runTests();
    expect(await running.ended).toBe(0);
    expect(lastLine(running)).toBe('2 passed, 0 failed');
  });

  it('fails when there was nothing to run', async () => {
    const running = runTests();
    expect(await running.ended).toBe(1);
    expect(lastLine(running)).toBe('0 passed, 1 failed');
  });

  it('ends a server and a process that a test forgot', async () => {
    writeTest(
      'forgetful',
      `it('forgets', async () => {
         await startOwnPostgres({ durable: false });
         spawn('sleep', ['600'], { detached: true, stdio: 'ignore' }).unref();
       }, 60_000);`,
    );
    const running = runTests();
    expect(await running.ended).toBe(0);
    expect(running.output()).toMatch(/\d+ process(es)? outlived the tests/);
    expectNothingLeft();
  }, 60_000);

  it('leaves nothing running when it is stopped in the middle', async () => {
    writeTest(
      'endless',
      `it('never ends', async () => {
         await startOwnPostgres({ durable: false });
         process.stdout.write('now it hangs');
         await new Promise(() => undefined);
       }, 600_000);`,
    );
    const running = runTests();
    await running.says('now it hangs');
    running.process.kill('SIGTERM');
    await running.ended;
    expectNothingLeft();
  }, 60_000);
});
