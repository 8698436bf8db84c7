import type { Logger } from 'pino';

/** One kind of the fold's work. `next` answers a piece of it, or undefined while there is none to do. */
export type FoldTask = { readonly name: string; readonly next: () => (() => Promise<void>) | undefined };

/** Runs pieces of work one after another, never two at once; no kind keeps another from its turn. */
export type FoldWork = {
  /** Something may be there to do. */
  readonly wake: () => void;
  /** Resolves when nothing is left to do. */
  readonly drain: () => Promise<void>;
  readonly stop: () => Promise<void>;
};

const PAUSE_AFTER_FAILURE_MS = 500;

/** Nothing runs before the first `wake`. */
export function createFoldWork(tasks: readonly FoldTask[], log: Logger): FoldWork {
  let running: Promise<void> | undefined;
  let stopped = false;
  let turn = 0;

  // The search goes on behind the kind that ran last, so that readings that never end do not starve the rest.
  const runNext = async (): Promise<boolean> => {
    for (let tried = 0; tried < tasks.length; tried += 1) {
      const task = tasks[turn];
      turn = (turn + 1) % tasks.length;
      const run = task?.next();
      if (task === undefined || run === undefined) continue;
      await run().catch(async (error: unknown) => {
        log.warn({ err: error, task: task.name }, 'fold work failed, trying again');
        await new Promise((resolve) => setTimeout(resolve, PAUSE_AFTER_FAILURE_MS));
      });
      return true;
    }
    return false;
  };
  const work = async (): Promise<void> => {
    // What is accepted in the same turn of the event loop is folded together.
    await new Promise((resolve) => setImmediate(resolve));
    while (!stopped && (await runNext()));
    running = undefined;
  };
  const drain = async (): Promise<void> => {
    while (running !== undefined) await running;
  };
  return {
    wake: () => {
      if (!stopped) running ??= work();
    },
    drain,
    stop: async () => {
      stopped = true;
      await drain();
    },
  };
}
