/**
 * `npm test`: installs what is missing, runs the tests and leaves nothing running. What follows `--` goes to Vitest:
 * `npm test -- tests/shared` runs one folder.
 */
import { spawn } from 'node:child_process';
import { chmodSync, existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { runToTheEnd } from './lifecycle.mjs';
import { endMarkedProcesses } from './marked-processes.mjs';
import { refuseOldNode } from './node-version.mjs';
import { prepareTests } from './prepare-tests.mjs';
import { sendSignal } from './process-table.mjs';
import { findQuickFolder } from './quick-folder.mjs';
import { say } from './say.mjs';
import { countResults, needsServices } from './test-arguments.mjs';

const project = join(dirname(fileURLToPath(import.meta.url)), '..', '..');

/** How long what the tests started may take to notice that they are over, in ms. */
const GRACE_MS = 8_000;

/**
 * @param {readonly string[]} args
 * @param {string} runFolder
 * @param {import('./lifecycle.mjs').Lifecycle} life
 * @returns {Promise<number | null>}
 */
function runVitest(args, runFolder, life) {
  const reports = ['--reporter=default', '--reporter=json', `--outputFile.json=${join(runFolder, 'report.json')}`];
  const vitest = join(project, 'node_modules', 'vitest', 'vitest.mjs');
  return new Promise((resolve) => {
    const child = spawn(process.execPath, [vitest, 'run', ...reports, ...args], {
      cwd: project,
      // What a test leaves among the temporary files goes with the run.
      env: { ...process.env, MILLRACE_TEST_RUN: runFolder, TMPDIR: runFolder },
      stdio: ['ignore', 'inherit', 'inherit'],
      detached: true,
    });
    child.on('error', () => resolve(null)).on('exit', resolve);
    const end = (/** @type {NodeJS.Signals} */ signal) => child.pid && sendSignal(-child.pid, signal);
    life.stopping.addEventListener('abort', () => end('SIGTERM'));
    life.hurry.addEventListener('abort', () => end('SIGKILL'));
  });
}

await runToTheEnd(async (life) => {
  refuseOldNode();
  const args = process.argv.slice(2);
  await prepareTests(project, { withServices: needsServices(args), signal: life.stopping });
  life.leaveIfStopping();
  const runFolder = mkdtempSync(join(findQuickFolder(), 'millrace-tests-'));
  // PostgreSQL's account passes through it to folders of its own.
  chmodSync(runFolder, 0o711);
  let summary = '0 passed, 1 failed';
  // Begun first, so said last, whatever else has to be told.
  life.atEnd(() => say(summary));
  life.atEnd(async () => {
    const count = await endMarkedProcesses(`MILLRACE_TEST_RUN=${runFolder}`, GRACE_MS);
    if (count > 0) say(`${count} ${count === 1 ? 'process' : 'processes'} outlived the tests and had to be ended.`);
    rmSync(runFolder, { recursive: true, force: true });
  });
  const code = await runVitest(args, runFolder, life);
  const report = join(runFolder, 'report.json');
  const { passed, failed } = countResults(existsSync(report) ? readFileSync(report, 'utf8') : undefined, code);
  summary = `${passed} passed, ${failed} failed`;
  return failed > 0 ? 1 : 0;
});
