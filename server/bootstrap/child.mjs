/**
 * What the start program and its children say to each other, over Node's channel between parent and child:
 *
 * - child → parent `{ type: 'progress', text }`: one line for the person who waits, as often as it likes;
 *   `{ type: 'ready' }`: it does its work now; `{ type: 'failed', text }`: it cannot start, and the text says what is
 *   wrong and what to type. A child uses `process.send?.(…)`: without a parent, as in production, there is no channel.
 * - parent → child: SIGTERM, end in order. A child that sees `disconnect` has lost its parent and ends likewise, so that
 *   a start program killed by force leaves nobody behind.
 *
 * Standard output and standard error of a child go to logs/<name>.log of the data folder.
 */
import { spawn } from 'node:child_process';
import { closeSync, openSync, statSync } from 'node:fs';
import { lastWords } from './last-words.mjs';
import { findProcess, sendSignal } from './process-table.mjs';

/**
 * @typedef {object} ChildPlan
 * @property {string} name
 * @property {readonly string[]} args what Node runs
 * @property {string} cwd
 * @property {NodeJS.ProcessEnv} env
 * @property {string | undefined} logFile undefined: it writes where we write
 *
 * @typedef {object} ChildEnd
 * @property {string} reason how it ended, in words
 * @property {string} words its last words: the remedy that it named, else the end of its log
 *
 * @typedef {object} Child
 * @property {import('./process-table.mjs').ProcessIdentity | undefined} identity
 * @property {Promise<ChildEnd | undefined>} settled undefined once it is ready; how it ended, when it ended before
 * @property {Promise<ChildEnd>} ended
 * @property {(graceMs: number, hurry: AbortSignal) => Promise<ChildEnd>} stop
 */

/**
 * Starts a child in a process group of its own: Ctrl-C at the terminal reaches the start program alone, which then
 * stops its children in order.
 *
 * @param {ChildPlan} plan
 * @param {(text: string) => void} onProgress
 * @returns {Child}
 */
export function startChild({ name, args, cwd, env, logFile }, onProgress) {
  const log = logFile === undefined ? undefined : openSync(logFile, 'a', 0o600);
  const logStart = logFile === undefined ? 0 : statSync(logFile).size;
  const output = log ?? 'inherit';
  const child = spawn(process.execPath, args, { cwd, env, detached: true, stdio: ['ignore', output, output, 'ipc'] });
  if (log !== undefined) closeSync(log);

  let remedy = '';
  /** @type {Promise<ChildEnd>} */
  const ended = new Promise((resolve) => {
    /** @param {string} reason */
    const end = (reason) => resolve({ reason, words: remedy || lastWords(logFile, logStart) });
    child.once('error', (error) => end(error.message));
    child.once('exit', (code, signal) => end(signal ? `was ended by ${signal}` : `ended with code ${code}`));
  });
  /** @type {Promise<ChildEnd | undefined>} */
  const settled = new Promise((resolve) => {
    child.on('message', (/** @type {{ type?: string, text?: string }} */ message) => {
      if (message?.type === 'progress') onProgress(`${name}: ${message.text}`);
      if (message?.type === 'failed') remedy = String(message.text);
      if (message?.type === 'ready') resolve(undefined);
    });
    ended.then(resolve);
  });
  return {
    identity: child.pid === undefined ? undefined : findProcess(child.pid),
    settled,
    ended,
    stop: (graceMs, hurry) => stopProcess(child.pid, ended, graceMs, hurry),
  };
}

/**
 * Asks, waits for as long as the grace or until somebody is in a hurry, then ends the whole group by force.
 *
 * @template T
 * @param {number | undefined} pid
 * @param {Promise<T>} ended
 * @param {number} graceMs
 * @param {AbortSignal} hurry
 */
async function stopProcess(pid, ended, graceMs, hurry) {
  if (pid === undefined) return ended;
  sendSignal(pid, 'SIGTERM');
  /** @type {NodeJS.Timeout | undefined} */
  let timer;
  await Promise.race([
    ended,
    new Promise((resolve) => {
      timer = setTimeout(resolve, graceMs);
      if (hurry.aborted) resolve(undefined);
      hurry.addEventListener('abort', resolve, { once: true });
    }),
  ]);
  clearTimeout(timer);
  sendSignal(-pid, 'SIGKILL');
  return ended;
}
