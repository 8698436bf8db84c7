import { spawn } from 'node:child_process';
import {
  appendFileSync,
  closeSync,
  existsSync,
  mkdirSync,
  openSync,
  readFileSync,
  renameSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import { dirname, join } from 'node:path';
import { giveTo } from './account.mjs';
import { lastWords } from './last-words.mjs';
import {
  findProcess,
  findWorkingFolder,
  isStillRunning,
  listProcessesIn,
  sendSignal,
  waitUntil,
} from './process-table.mjs';
import { runCommand } from './run-command.mjs';
import { refusal } from './say.mjs';

/**
 * One PostgreSQL of our own: a folder, the programs that run it and the account they run as.
 *
 * @typedef {object} Cluster
 * @property {string} programs folder of postgres, initdb and psql
 * @property {string} folder the data folder; its parent must exist and belong to the account
 * @property {string} socketFolder where its Unix socket lies; '' for none
 * @property {string} logFile
 * @property {import('./account.mjs').Account | undefined} account
 */

/** @param {string} folder @returns {number | undefined} the major version that made a data folder */
export function findDataMajor(folder) {
  const file = join(folder, 'PG_VERSION');
  return existsSync(file) ? Number.parseInt(readFileSync(file, 'utf8'), 10) : undefined;
}

/**
 * Makes the data folder, all of it or nothing: it is built beside its place and moved there when complete, so that an
 * interrupted first start leaves nothing that looks like a database.
 *
 * @param {Cluster} cluster
 * @param {{ superuserPassword: string, settings: readonly string[], isThrowaway?: boolean }} options settings: lines of
 *   postgresql.conf; isThrowaway: nobody minds when it is lost with the machine's power
 */
export async function createCluster(
  { programs, folder, account },
  { superuserPassword, settings, isThrowaway = false },
) {
  const [building, passwordFile] = [`${folder}.new`, `${folder}.password`];
  rmSync(building, { recursive: true, force: true });
  rmSync(passwordFile, { force: true });
  writeFileSync(passwordFile, superuserPassword, { mode: 0o600 });
  giveTo(account, passwordFile);
  const method = 'scram-sha-256';
  const { code, stdout, stderr } = await runCommand(
    join(programs, 'initdb'),
    [
      '-D',
      building,
      '-U',
      'postgres',
      `--pwfile=${passwordFile}`,
      `--auth-local=${method}`,
      `--auth-host=${method}`,
    ].concat(['--encoding=UTF8', '--locale=C.UTF-8', '--no-instructions', ...(isThrowaway ? ['--no-sync'] : [])]),
    { account, cwd: dirname(folder), env: { ...process.env, LC_ALL: 'C.UTF-8' } },
  );
  rmSync(passwordFile, { force: true });
  if (code !== 0) rmSync(building, { recursive: true, force: true });
  if (code !== 0) throw refusal(`PostgreSQL could not make its data folder ${folder}:\n${stdout}${stderr}`.trim());
  appendFileSync(join(building, 'postgresql.conf'), `\n# Millrace\n${settings.join('\n')}\n`);
  renameSync(building, folder);
}

/**
 * The server that runs on a data folder now, found through its own lock file; undefined when there is none. A lock
 * file left by a crash names a process that is gone, or a stranger that works in another folder.
 *
 * @param {string} folder
 * @returns {{ pid: number, started: string, port: number, isReady: boolean } | undefined}
 */
export function findRunningServer(folder) {
  const file = join(folder, 'postmaster.pid');
  if (!existsSync(file)) return undefined;
  // Lines: pid, data folder, start, port, socket folder, listen address, shared memory, status (miscadmin.h).
  const lines = readFileSync(file, 'utf8').split('\n');
  const identity = findProcess(Number(lines[0]));
  if (!identity || findWorkingFolder(identity.pid) !== folder) return undefined;
  return { ...identity, port: Number(lines[3]), isReady: lines[7]?.trim() === 'ready' };
}

/**
 * Takes away the lock files of a server that is gone, its folder's and its socket's. PostgreSQL does so itself unless
 * the number in them belongs to somebody else by now, as after a restart of the machine, or to a corpse that nobody
 * collects, as in a container. Never while a process of the old server still works in the folder: two servers on one
 * folder destroy it.
 *
 * @param {string} folder
 * @param {string} socket its path, '' for none
 */
async function removeStaleLocks(folder, socket) {
  if (!(await waitUntil(() => listProcessesIn(folder).length === 0, 10_000))) {
    const pids = listProcessesIn(folder).join(' ');
    throw refusal(`Processes of an earlier PostgreSQL still work in ${folder}. Type: kill ${pids}   and start again.`);
  }
  const files = [join(folder, 'postmaster.pid'), ...(socket ? [socket, `${socket}.lock`] : [])];
  for (const file of files) rmSync(file, { force: true });
}

/**
 * Starts PostgreSQL on 127.0.0.1 and waits until it takes connections. It survives us: whoever starts next finds it
 * through its lock file.
 *
 * @param {Cluster} cluster
 * @param {{ port: number, withinMs?: number }} options
 */
export async function startCluster(cluster, { port, withinMs = 120_000 }) {
  const { programs, folder, socketFolder, logFile, account } = cluster;
  await removeStaleLocks(folder, socketFolder && join(socketFolder, `.s.PGSQL.${port}`));
  if (socketFolder) {
    mkdirSync(socketFolder, { recursive: true, mode: 0o700 });
    giveTo(account, socketFolder);
  }
  const log = openSync(logFile, 'a', 0o600);
  const logStart = statSync(logFile).size;
  const settings = { listen_addresses: '127.0.0.1', port, unix_socket_directories: socketFolder };
  const server = spawn(
    join(programs, 'postgres'),
    ['-D', folder, ...Object.entries(settings).flatMap(([name, value]) => ['-c', `${name}=${value}`])],
    {
      cwd: '/',
      detached: true,
      stdio: ['ignore', log, log],
      ...(account ? { uid: account.uid, gid: account.gid } : {}),
    },
  );
  closeSync(log);
  let hasEnded = false;
  server
    .on('error', () => {
      hasEnded = true;
    })
    .on('exit', () => {
      hasEnded = true;
    });
  server.unref();
  await waitUntil(() => hasEnded || findRunningServer(folder)?.isReady === true, withinMs);
  if (findRunningServer(folder)?.isReady) return;
  if (!hasEnded && server.pid) sendSignal(server.pid, 'SIGQUIT');
  throw refusal(`PostgreSQL did not start. Its last words (${logFile}):\n${lastWords(logFile, logStart, 8)}`);
}

/**
 * Stops the server of a data folder and does not return before it is gone: first sessions are ended and everything is
 * written, then, when that takes too long or somebody is in a hurry, at once (the next start recovers), then by force.
 *
 * @param {string} folder
 * @param {{ graceMs?: number, hurry?: AbortSignal }} [options]
 */
export async function stopCluster(folder, { graceMs = 30_000, hurry } = {}) {
  const server = findRunningServer(folder);
  if (!server) return;
  const isGone = () => !isStillRunning(server);
  sendSignal(server.pid, 'SIGINT');
  await waitUntil(() => isGone() || hurry?.aborted === true, graceMs);
  for (const signal of /** @type {const} */ (['SIGQUIT', 'SIGKILL'])) {
    if (isGone()) return;
    sendSignal(server.pid, signal);
    await waitUntil(isGone, 10_000);
  }
  if (isGone()) return;
  throw refusal(`PostgreSQL (process ${server.pid}) does not stop. Type: kill -9 ${server.pid}`);
}
