import { say, wordsFor } from './say.mjs';

/**
 * What is going on has an end, and everything begun is ended in the opposite order.
 *
 * @typedef {object} Lifecycle
 * @property {AbortSignal} stopping aborted once somebody wants everything to stop
 * @property {AbortSignal} hurry aborted when they ask a second time
 * @property {Promise<void>} stopped resolves when `stopping` is aborted
 * @property {(text: string) => void} requestStop
 * @property {() => void} leaveIfStopping throws `Stopping` between two steps
 * @property {<T>(work: Promise<T>) => Promise<T>} orStopping the work's result, or `Stopping` thrown at once
 * @property {(undo: () => unknown) => void} atEnd
 * @property {() => Promise<void>} unwind
 */

/** Thrown to leave a start that is no longer wanted. It is not a fault. */
export const STOPPING = Symbol('stopping');

/** Ctrl-C at a terminal reaches us twice under npm, which passes on what we got ourselves: it is one wish. In ms. */
const ONE_WISH_MS = 500;

/**
 * Follows Ctrl-C, TERM and HUP (the terminal is gone). The first asks for an end in order, the next one hurries.
 *
 * @param {import('node:events').EventEmitter} [signals] the process, or a stand-in
 * @param {() => number} [now] ms
 * @returns {Lifecycle}
 */
export function followSignals(signals = process, now = () => performance.now()) {
  const [stop, hurry] = [new AbortController(), new AbortController()];
  /** @type {(() => unknown)[]} */
  const undos = [];
  /** @type {Promise<void>} */
  const stopped = new Promise((resolve) => stop.signal.addEventListener('abort', () => resolve()));
  const leaveIfStopping = () => {
    if (stop.signal.aborted) throw STOPPING;
  };
  let askedAt = 0;
  /** @param {string} text */
  const requestStop = (text) => {
    if (!stop.signal.aborted) {
      askedAt = now();
      say(text);
      return stop.abort();
    }
    if (hurry.signal.aborted || now() - askedAt < ONE_WISH_MS) return;
    say('Hurrying.');
    hurry.abort();
  };
  for (const name of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
    signals.on(name, () => requestStop(`\nStopping (${name}); once more to hurry.`));
  }
  watchNpm(requestStop);
  return {
    stopping: stop.signal,
    hurry: hurry.signal,
    stopped,
    requestStop,
    leaveIfStopping,
    orStopping: (work) => Promise.race([work, stopped.then(() => Promise.reject(STOPPING))]),
    atEnd: (undo) => undos.push(undo),
    unwind: async () => {
      for (let undo = undos.pop(); undo; undo = undos.pop()) {
        // One that fails must not keep the others, PostgreSQL above all, from being stopped.
        await Promise.resolve()
          .then(undo)
          .catch((error) => say(wordsFor(error)));
      }
    },
  };
}

/** How often we look whether npm is still there, in ms. */
const LOOK_EVERY_MS = 500;

/**
 * Under npm, which passes TERM on but not its own death by force, a new parent means that npm is gone and with it
 * whoever could stop us. Started without npm, we may outlive the shell we came from.
 *
 * @param {(text: string) => void} requestStop
 */
function watchNpm(requestStop) {
  if (!process.env.npm_lifecycle_event) return;
  const parent = process.ppid;
  const timer = setInterval(() => {
    if (process.ppid === parent) return;
    clearInterval(timer);
    requestStop('\nStopping: npm is gone.');
  }, LOOK_EVERY_MS);
  timer.unref();
}

/**
 * Runs a program to its end: what it began is always ended, what went wrong is said, and the exit code tells.
 *
 * @param {(life: Lifecycle) => Promise<number | void>} main what it returns is the exit code, 0 when nothing
 */
export async function runToTheEnd(main) {
  // A terminal that is gone, or a reader that closed the pipe, is no reason to leave a database running.
  for (const stream of [process.stdout, process.stderr]) stream.on('error', () => undefined);
  const life = followSignals();
  let code = 0;
  try {
    code = (await main(life)) ?? 0;
  } catch (error) {
    if (error !== STOPPING) {
      process.stderr.write(`\n${wordsFor(error)}\n`);
      code = 1;
    }
  }
  await life.unwind();
  process.exit(code);
}
