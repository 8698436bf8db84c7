import { fork } from 'node:child_process';
import { fileURLToPath } from 'node:url';

type Message = Readonly<Record<string, unknown>>;

/** A process of the bench that is spoken to by messages and never outlives the bench. */
export type BenchChild = {
  readonly send: (message: unknown) => void;
  /** The next message that bears this field, or an error when the process ends or takes too long. */
  readonly next: <Answer>(field: string, withinMs?: number) => Promise<Answer>;
  readonly stop: () => Promise<void>;
};

const PATIENCE_MS = 60_000;

/** Starts a file of this folder. */
export function startChild(file: string, parameters: readonly string[] = []): BenchChild {
  const path = fileURLToPath(new URL(`./${file}`, import.meta.url));
  const child = fork(path, parameters, {
    execArgv: ['--import', 'tsx'],
    stdio: ['ignore', 'ignore', 'inherit', 'ipc'],
  });
  const arrived: Message[] = [];
  const waiting = new Set<() => void>();
  let ended = false;
  const wake = () => {
    for (const one of waiting) one();
  };
  child.on('message', (message: Message) => {
    arrived.push(message);
    wake();
  });
  const exited = new Promise<void>((resolve) =>
    child.once('exit', () => {
      ended = true;
      wake();
      resolve();
    }),
  );
  const next = <Answer>(field: string, withinMs = PATIENCE_MS): Promise<Answer> =>
    new Promise((resolve, reject) => {
      const look = (): void => {
        const place = arrived.findIndex((message) => field in message || 'error' in message);
        const found = arrived[place];
        if (found === undefined && !ended) return;
        waiting.delete(look);
        clearTimeout(timer);
        arrived.splice(place, 1);
        if (found === undefined) reject(new Error(`${file} ended before it said ${field}`));
        else if ('error' in found) reject(new Error(`${file}: ${found.error}`));
        else resolve(found[field] as Answer);
      };
      const timer = setTimeout(() => {
        waiting.delete(look);
        reject(new Error(`${file} did not say ${field} within ${withinMs} ms`));
      }, withinMs);
      waiting.add(look);
      look();
    });
  return {
    send: (message) => void child.send(message as object),
    next,
    stop: async () => {
      if (!ended) child.kill('SIGKILL');
      await exited;
    },
  };
}
