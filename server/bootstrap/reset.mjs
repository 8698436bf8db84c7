/** `npm run reset`: the demo as on its first day. Whatever runs is stopped first. */
import { readdirSync, rmSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { stopCluster } from './cluster.mjs';
import { findDatabaseFolder, isOurs, MARKER } from './data-folder.mjs';
import { findLockHolder, takeInstanceLock } from './instance-lock.mjs';
import { runToTheEnd } from './lifecycle.mjs';
import { endOrphans } from './orphans.mjs';
import { sendSignal, waitUntil } from './process-table.mjs';
import { refusal, say } from './say.mjs';
import { readSettings } from './settings.mjs';

/** How long a running demo may take to stop, in ms: every program its grace, and PostgreSQL its own. */
const STOP_WITHIN_MS = 90_000;

/** What a reset leaves: whose folder it is, and what went on before. */
const KEPT = [MARKER, 'logs'];

/** @param {string} dataFolder */
async function stopWhatRuns(dataFolder) {
  const holder = await findLockHolder(dataFolder);
  if (holder !== undefined) {
    say(`Stopping the demo that runs (process ${holder})`);
    sendSignal(holder, 'SIGTERM');
  }
  // Taking the lock also keeps a start from beginning before we are done.
  if (!(await waitUntil(() => takeInstanceLock(dataFolder), STOP_WITHIN_MS))) {
    throw refusal(`Process ${holder} does not stop. Type: kill -9 ${holder}   and try again.`);
  }
  await endOrphans(dataFolder);
}

/** @param {string} dataFolder */
async function deleteData(dataFolder) {
  const folder = findDatabaseFolder(dataFolder);
  if (folder !== undefined) {
    await stopCluster(join(folder, 'data'), { graceMs: 5_000 });
    const isOutside = folder !== join(dataFolder, 'postgres');
    if (isOutside && !isOurs(dirname(folder))) throw refusal(`${folder} is not Millrace's; nothing was deleted.`);
    rmSync(isOutside ? dirname(folder) : folder, { recursive: true, force: true });
  }
  for (const name of readdirSync(dataFolder).filter((name) => !KEPT.includes(name))) {
    rmSync(join(dataFolder, name), { recursive: true, force: true });
  }
}

await runToTheEnd(async () => {
  const { dataFolder, databaseUrl } = readSettings(process.env);
  if (databaseUrl) throw refusal("DATABASE_URL is set: that is a company's database, and only the demo can be reset.");
  if (!isOurs(dataFolder)) throw refusal(`There is no demo in ${dataFolder}; nothing was deleted. Type: npm start`);
  await stopWhatRuns(dataFolder);
  await deleteData(dataFolder);
  say('The demo is gone. Type: npm start   for a new one.');
});
