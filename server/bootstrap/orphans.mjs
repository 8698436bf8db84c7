import { existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { isStillRunning, sendSignal, waitUntil } from './process-table.mjs';

/** @typedef {import('./process-table.mjs').ProcessIdentity & { name: string }} NamedProcess */

/** @param {string} dataFolder */
const fileOf = (dataFolder) => join(dataFolder, 'children.json');

/**
 * Writes down who runs, so that the next start can end them if this one is killed before it does.
 *
 * @param {string} dataFolder
 * @param {readonly NamedProcess[]} children
 */
export function recordChildren(dataFolder, children) {
  const file = fileOf(dataFolder);
  writeFileSync(`${file}.new`, JSON.stringify(children));
  renameSync(`${file}.new`, file);
}

/** @param {string} dataFolder @returns {NamedProcess[]} */
function listRecorded(dataFolder) {
  try {
    return existsSync(fileOf(dataFolder)) ? JSON.parse(readFileSync(fileOf(dataFolder), 'utf8')) : [];
  } catch {
    // Cut short by a crash: nothing to go by, and a port still taken will be named.
    return [];
  }
}

/**
 * Ends what a start program that was killed left behind, and returns the names of those. A process that only has the
 * number of one of ours is left alone.
 *
 * @param {string} dataFolder
 * @param {{ graceMs?: number }} [options]
 */
export async function endOrphans(dataFolder, { graceMs = 5_000 } = {}) {
  const orphans = listRecorded(dataFolder).filter(isStillRunning);
  for (const { pid } of orphans) sendSignal(pid, 'SIGTERM');
  const areGone = () => !orphans.some(isStillRunning);
  if (!(await waitUntil(areGone, graceMs))) {
    for (const { pid } of orphans.filter(isStillRunning)) sendSignal(-pid, 'SIGKILL');
    await waitUntil(areGone, 5_000);
  }
  return orphans.map(({ name }) => name);
}
