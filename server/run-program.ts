import type { Logger } from 'pino';
import { type Environment, readProcessEnvironment } from './env.ts';
import { createLogger } from './log/logger.ts';

/** What a program of ours is given while it starts. */
export type Program = {
  readonly env: Environment;
  readonly log: Logger;
  /** Tells whoever waits how far the start has come. */
  readonly progress: (text: string) => void;
  /** Adds what must be ended; ended in the opposite order. */
  readonly atEnd: (undo: () => unknown) => void;
};

/** Ending in order may take this long; then the process leaves what it cannot end. */
const LONGEST_STOP_MS = 20_000;

/**
 * Runs a program: starts it, says when it works, ends it in order on TERM, Ctrl-C, or when the start program that
 * spawned it is gone. A start that fails is said to the start program in words, and ends the process.
 */
export async function runProgram(name: string, start: (program: Program) => Promise<void>): Promise<void> {
  const undos: (() => unknown)[] = [];
  let log: Logger | undefined;
  let isStopping = false;
  const stop = async (code: number): Promise<void> => {
    if (isStopping) return;
    isStopping = true;
    setTimeout(() => process.exit(code || 1), LONGEST_STOP_MS).unref();
    for (let undo = undos.pop(); undo; undo = undos.pop()) {
      // One that fails must not keep the others from ending.
      await Promise.resolve(undo)
        .then((end) => end())
        .catch((err) => log?.error({ err }, 'did not end in order'));
    }
    process.exit(code);
  };
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, () => void stop(0));
  process.on('disconnect', () => void stop(0));
  try {
    const env = readProcessEnvironment();
    const logger = createLogger(name, env.logLevel);
    log = logger;
    const progress = (text: string) => {
      logger.info(text);
      tell({ type: 'progress', text });
    };
    await start({ env, log: logger, progress, atEnd: (undo) => undos.push(undo) });
    tell({ type: 'ready' });
  } catch (error) {
    const text = error instanceof Error ? error.message : String(error);
    log?.fatal({ err: error }, 'cannot start');
    if (log === undefined || log.level === 'silent') process.stderr.write(`${text}\n`);
    tell({ type: 'failed', text });
    await stop(1);
  }
}

/** To the start program, when it spawned us. */
function tell(message: { readonly type: 'progress' | 'ready' | 'failed'; readonly text?: string }): void {
  if (process.connected) process.send?.(message);
}
