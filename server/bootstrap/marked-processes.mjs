import { readdirSync, readFileSync } from 'node:fs';
import { findProcess, sendSignal, waitUntil } from './process-table.mjs';

/**
 * Processes whose environment holds a mark: everything that descends from the one that was given it, whatever groups
 * and sessions they moved to. Ourselves not included.
 *
 * @param {string} mark a whole `NAME=value`
 */
export function listMarkedProcesses(mark) {
  const pids = readdirSync('/proc').filter((name) => /^\d+$/.test(name));
  return pids.map(Number).filter((pid) => pid !== process.pid && findProcess(pid) && isMarked(pid, mark));
}

/** @param {number} pid @param {string} mark */
function isMarked(pid, mark) {
  try {
    return readFileSync(`/proc/${pid}/environ`, 'utf8').split('\0').includes(mark);
  } catch {
    return false;
  }
}

/**
 * Waits for marked processes to end by themselves, then ends those that do not. Returns how many had to be.
 *
 * @param {string} mark
 * @param {number} graceMs
 */
export async function endMarkedProcesses(mark, graceMs) {
  if (await waitUntil(() => listMarkedProcesses(mark).length === 0, graceMs)) return 0;
  const left = listMarkedProcesses(mark);
  for (const pid of left) sendSignal(pid, 'SIGKILL');
  await waitUntil(() => listMarkedProcesses(mark).length === 0, 5_000);
  return left.length;
}
