import { keepRunning } from './keep-running.mjs';
import { recordChildren } from './orphans.mjs';
import { rotateLog } from './programs.mjs';
import { say } from './say.mjs';

/** How long a program may take to end in order, in ms. */
const GRACE_MS = 10_000;

/**
 * Starts programs one after the other, each when the one before it is ready, and keeps them running. Each is stopped
 * when the lifecycle ends, the last one first.
 *
 * @param {readonly (import('./child.mjs').ChildPlan & { doing: string })[]} plans
 * @param {import('./lifecycle.mjs').Lifecycle} life
 * @param {{ dataFolder?: string, graceMs?: number, delays?: readonly number[] }} [options] dataFolder: where it is
 *   written down who runs
 * @returns {Promise<import('./keep-running.mjs').Kept[]>}
 */
export async function runPrograms(plans, life, { dataFolder, graceMs = GRACE_MS, delays } = {}) {
  /** @type {import('./keep-running.mjs').Kept[]} */
  const kept = [];
  const onSpawn = () => {
    if (dataFolder === undefined) return;
    const named = kept.flatMap(({ name, findIdentity }) => {
      const identity = findIdentity();
      return identity ? [{ name, ...identity }] : [];
    });
    recordChildren(dataFolder, named);
  };
  for (const plan of plans) {
    life.leaveIfStopping();
    say(plan.doing);
    if (plan.logFile) rotateLog(plan.logFile);
    const child = keepRunning(plan, { onSpawn, ...(delays ? { delays } : {}) });
    kept.push(child);
    life.atEnd(async () => {
      say(`Stopping ${plan.name}`);
      await child.stop(graceMs, life.hurry);
    });
    onSpawn();
    await life.orStopping(child.ready);
  }
  return kept;
}
