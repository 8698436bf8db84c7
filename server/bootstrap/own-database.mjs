import { totalmem } from 'node:os';
import { join } from 'node:path';
import { findDatabaseAccount } from './account.mjs';
import { createCluster, findDataMajor, findRunningServer, startCluster, stopCluster } from './cluster.mjs';
import { chooseSocketFolder, findDatabaseFolder, openDatabaseFolder } from './data-folder.mjs';
import { obtainPostgres } from './obtain-postgres.mjs';
import { listPortTroubles } from './ports.mjs';
import { prepareDatabase } from './prepare-database.mjs';
import { waitUntil } from './process-table.mjs';
import { rotateLog } from './programs.mjs';
import { refusal, say, wordsFor } from './say.mjs';

/** How often the database is looked after, in ms. It is no child of ours, so its death is not reported to us. */
const LOOK_EVERY_MS = 2_000;

/** How long a restart that failed is not tried again, in ms: a full disk does not empty itself in a moment. */
const AFTER_FAILURE_MS = 30_000;

/** Lines of postgresql.conf for a machine with this much memory, in bytes. */
export function listSettings(memory = totalmem()) {
  const sharedMegabytes = Math.min(1024, Math.max(128, Math.floor(memory / 2 ** 20 / 16)));
  return [
    `shared_buffers = ${sharedMegabytes}MB`,
    'max_wal_size = 2GB',
    'wal_compression = on',
    // A reading is acknowledged to its device once it is committed, so a commit must be on the disk.
    'synchronous_commit = on',
    'max_connections = 100',
    'jit = off',
    "timezone = 'UTC'",
    "log_timezone = 'UTC'",
  ];
}

/**
 * PostgreSQL for the demo: installed, made, started, or, when a start program that was killed left it running, taken
 * over. It is stopped when the lifecycle ends, and started again when it dies before that.
 *
 * @param {import('./settings.mjs').Settings} settings
 * @param {import('./secrets.mjs').Secrets} secrets
 * @param {import('./lifecycle.mjs').Lifecycle} life
 * @returns {Promise<string>} DATABASE_URL
 */
export async function startOwnDatabase({ dataFolder, pgPort: port }, secrets, life) {
  const known = findDatabaseFolder(dataFolder);
  const dataMajor = known === undefined ? undefined : findDataMajor(join(known, 'data'));
  const { folder: programs, major } = await obtainPostgres({ dataMajor, dataFolder });
  life.leaveIfStopping();
  const account = findDatabaseAccount();
  const databaseFolder = await openDatabaseFolder(dataFolder, account);
  const cluster = {
    programs,
    folder: join(databaseFolder, 'data'),
    socketFolder: chooseSocketFolder(databaseFolder, port),
    logFile: join(dataFolder, 'logs', 'postgres.log'),
    account,
  };
  if (dataMajor === undefined) {
    say(`Making a database with PostgreSQL ${major} in ${cluster.folder}`);
    await createCluster(cluster, { superuserPassword: secrets.superuserPassword, settings: listSettings() });
    life.leaveIfStopping();
  }
  life.atEnd(async () => {
    say('Stopping PostgreSQL');
    await stopCluster(cluster.folder, { hurry: life.hurry });
  });
  rotateLog(cluster.logFile);
  await startOrTakeOver(cluster, port);
  life.leaveIfStopping();
  const databaseUrl = await prepareDatabase({ programs, port, secrets });
  watch(cluster, port, life);
  return databaseUrl;
}

/** @param {import('./cluster.mjs').Cluster} cluster @param {number} port */
async function startOrTakeOver(cluster, port) {
  const running = findRunningServer(cluster.folder);
  if (running?.port === port) {
    say(`PostgreSQL runs already on 127.0.0.1:${port}; taking it over`);
    if (await waitUntil(() => findRunningServer(cluster.folder)?.isReady === true, 120_000)) return;
  }
  if (running) await stopCluster(cluster.folder);
  const troubles = await listPortTroubles({ PG_PORT: port });
  if (troubles.length > 0) throw refusal(troubles.join('\n'));
  say(`Starting PostgreSQL on 127.0.0.1:${port}`);
  await startCluster(cluster, { port });
}

/**
 * @param {import('./cluster.mjs').Cluster} cluster
 * @param {number} port
 * @param {import('./lifecycle.mjs').Lifecycle} life
 */
function watch(cluster, port, life) {
  let restarting = Promise.resolve();
  let [isRestarting, notBefore] = [false, 0];
  const timer = setInterval(() => {
    if (isRestarting || life.stopping.aborted || performance.now() < notBefore) return;
    if (findRunningServer(cluster.folder)) return;
    isRestarting = true;
    say('PostgreSQL is gone; starting it again');
    restarting = startCluster(cluster, { port })
      .catch((error) => {
        say(wordsFor(error));
        notBefore = performance.now() + AFTER_FAILURE_MS;
      })
      .finally(() => {
        isRestarting = false;
      });
  }, LOOK_EVERY_MS);
  life.atEnd(async () => {
    clearInterval(timer);
    await restarting;
  });
}
