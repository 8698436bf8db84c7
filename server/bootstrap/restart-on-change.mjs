import { watch } from 'node:fs';
import { join } from 'node:path';
import { say } from './say.mjs';

/** Programs that run the server's sources. */
const RESTARTED = ['node', 'worker'];

/** An editor writes a file in several steps, and a checkout writes many files; they are one change. */
const SETTLE_MS = 200;

/**
 * Restarts the server's programs when their sources change, until the lifecycle ends.
 *
 * @param {string} project
 * @param {readonly import('./keep-running.mjs').Kept[]} kept
 * @param {import('./lifecycle.mjs').Lifecycle} life
 */
export function restartOnChange(project, kept, life) {
  /** @type {NodeJS.Timeout | undefined} */
  let timer;
  const restart = async () => {
    say('The sources changed; restarting the server');
    for (const child of kept.filter(({ name }) => RESTARTED.includes(name))) await child.restart(5_000);
  };
  for (const folder of ['server', 'shared']) {
    const watcher = watch(join(project, folder), { recursive: true }, (_event, file) => {
      if (!file?.endsWith('.ts')) return;
      clearTimeout(timer);
      timer = setTimeout(restart, SETTLE_MS);
    });
    life.atEnd(() => {
      watcher.close();
      clearTimeout(timer);
    });
  }
}
