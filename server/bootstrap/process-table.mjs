import { readdirSync, readFileSync, readlinkSync } from 'node:fs';

/**
 * A process as the kernel knows it: its number alone is not enough, numbers are used again after a crash.
 *
 * @typedef {{ readonly pid: number, readonly started: string }} ProcessIdentity
 */

/**
 * The fields of /proc/<pid>/stat after the command name (which may hold blanks and brackets), or undefined when
 * there is no such process. Field numbers as in proc(5), less three.
 *
 * @param {number} pid
 */
function statFields(pid) {
  try {
    const text = readFileSync(`/proc/${pid}/stat`, 'utf8');
    return text.slice(text.lastIndexOf(')') + 2).split(' ');
  } catch {
    return undefined;
  }
}

/**
 * Who this number is now; undefined when nobody is, or only a corpse that its parent has not collected.
 *
 * @param {number} pid
 * @returns {ProcessIdentity | undefined}
 */
export function findProcess(pid) {
  const fields = statFields(pid);
  if (!fields || fields[0] === 'Z' || fields[0] === 'X') return undefined;
  return { pid, started: fields[19] ?? '' };
}

/** @param {ProcessIdentity} identity */
export function isStillRunning(identity) {
  return findProcess(identity.pid)?.started === identity.started;
}

/**
 * The working folder of a process, undefined when there is no such process or it is not ours to ask.
 *
 * @param {number} pid
 */
export function findWorkingFolder(pid) {
  try {
    return readlinkSync(`/proc/${pid}/cwd`);
  } catch {
    return undefined;
  }
}

/** The processes that work in a folder, as far as we may see. @param {string} folder */
export function listProcessesIn(folder) {
  const pids = readdirSync('/proc').filter((name) => /^\d+$/.test(name));
  return pids.map(Number).filter((pid) => findWorkingFolder(pid) === folder && findProcess(pid) !== undefined);
}

/**
 * Sends a signal; false when there was nobody to take it. A negative number is a process group, as in kill(2).
 *
 * @param {number} pid
 * @param {NodeJS.Signals} signal
 */
export function sendSignal(pid, signal) {
  try {
    return process.kill(pid, signal);
  } catch {
    return false;
  }
}

/**
 * Waits until a condition holds; false when it still does not after `withinMs`.
 *
 * @param {() => boolean | Promise<boolean>} condition
 * @param {number} withinMs
 */
export async function waitUntil(condition, withinMs) {
  const end = performance.now() + withinMs;
  while (performance.now() < end) {
    if (await condition()) return true;
    await new Promise((resolve) => setTimeout(resolve, 25));
  }
  return condition();
}
