import { setTimeout as wait } from 'node:timers/promises';
import { startChild } from './child.mjs';
import { sendSignal } from './process-table.mjs';
import { refusal, say } from './say.mjs';

/** Waits before a restart, in ms: a child that dies again and again must not eat the machine. */
const DELAYS = [1_000, 2_000, 4_000, 8_000, 16_000, 30_000];

/** A child that lived this long has got over whatever killed it. */
const HEALTHY_AFTER_MS = 60_000;

/** How long somebody who waits hears nothing before they are told that nothing hangs. */
const PATIENCE_MS = 15_000;

/**
 * @typedef {object} Kept
 * @property {string} name
 * @property {() => import('./process-table.mjs').ProcessIdentity | undefined} findIdentity
 * @property {(graceMs: number, hurry: AbortSignal) => Promise<void>} stop
 * @property {(graceMs: number) => Promise<void>} restart ends it, and it starts again at once
 */

/**
 * Starts a child and returns at once; `ready` resolves when it does its work and throws when it dies before that. From
 * then on a child that dies is started again, a little later each time, until it is stopped.
 *
 * @param {import('./child.mjs').ChildPlan} plan
 * @param {{ onSpawn?: () => void, delays?: readonly number[] }} [options]
 * @returns {Kept & { ready: Promise<void> }}
 */
export function keepRunning(plan, { onSpawn = () => undefined, delays = DELAYS } = {}) {
  const stopping = new AbortController();
  let heardAt = performance.now();
  /** @param {string} text */
  const tell = (text) => {
    heardAt = performance.now();
    say(`  ${text}`);
  };
  const begin = () => {
    const child = startChild(plan, tell);
    const started = performance.now();
    return { ...child, lived: () => performance.now() - started };
  };
  let current = begin();
  let isRestartWanted = false;

  async function restartWhenItDies() {
    for (let failures = 0; ; failures += 1) {
      const { reason, words } = await current.ended;
      if (stopping.signal.aborted) return;
      if (current.identity) sendSignal(-current.identity.pid, 'SIGKILL');
      if (isRestartWanted || current.lived() > HEALTHY_AFTER_MS) failures = 0;
      const delay = isRestartWanted ? 0 : (delays[Math.min(failures, delays.length - 1)] ?? 0);
      if (!isRestartWanted)
        say(`${plan.name} ${reason}; it starts again in ${delay / 1000} s. Its last words:\n${words}`);
      await wait(delay, undefined, { signal: stopping.signal }).catch(() => undefined);
      if (stopping.signal.aborted) return;
      isRestartWanted = false;
      current = begin();
      onSpawn();
      current.settled.then((end) => end ?? say(`${plan.name} runs again.`));
    }
  }

  async function untilReady() {
    const began = performance.now();
    let where = plan.logFile ? `; its log: ${plan.logFile}` : '';
    const patience = setInterval(() => {
      if (performance.now() - heardAt < PATIENCE_MS) return;
      say(`  ${plan.name}: still working (${Math.round((performance.now() - began) / 1000)} s)${where}`);
      where = '';
    }, PATIENCE_MS);
    const end = await current.settled.finally(() => clearInterval(patience));
    if (end && !stopping.signal.aborted) throw refusal(`${plan.name} ${end.reason} before it was ready:\n${end.words}`);
    if (!end) supervision = restartWhenItDies();
  }

  /** @type {Promise<void> | undefined} */
  let supervision;
  const ready = untilReady();
  ready.catch(() => undefined);
  return {
    name: plan.name,
    ready,
    findIdentity: () => current.identity,
    stop: async (graceMs, hurry) => {
      stopping.abort();
      await current.stop(graceMs, hurry);
      await supervision;
    },
    restart: async (graceMs) => {
      isRestartWanted = true;
      await current.stop(graceMs, stopping.signal);
    },
  };
}
