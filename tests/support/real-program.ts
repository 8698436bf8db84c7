import { type ChildProcess, spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';

/** One of the product's own programs as a process that a test may kill. */
export type RealProgram = {
  /** Resolves when it says that it is ready. */
  readonly start: () => Promise<void>;
  /** It dies at once, as when the power goes. */
  readonly killHard: () => Promise<void>;
};

/** `file` is that of the program, from the root of the project. Its log goes to standard error when TEST_LOG is set. */
export function createRealProgram(file: string, env: NodeJS.ProcessEnv): RealProgram {
  let child: ChildProcess | undefined;
  return {
    start: () =>
      new Promise((resolve, reject) => {
        const log = process.env.TEST_LOG === undefined ? 'ignore' : 'inherit';
        const started = spawn(process.execPath, ['--import', 'tsx', file], {
          cwd: fileURLToPath(new URL('../../', import.meta.url)),
          env: { ...process.env, ...env },
          stdio: ['ignore', log, log, 'ipc'],
        });
        child = started;
        started.on('message', (message: { type?: string; text?: string }) => {
          if (message.type === 'ready') resolve();
          if (message.type === 'failed') reject(new Error(`${file}: ${message.text}`));
        });
        started.once('exit', (code) => reject(new Error(`${file} ended with ${code}`)));
      }),
    killHard: () =>
      new Promise((resolve) => {
        if (child === undefined || child.exitCode !== null || child.signalCode !== null) return resolve();
        child.once('exit', () => resolve());
        child.kill('SIGKILL');
      }),
  };
}
