import type { DevicePace } from './device-pace.ts';

/** Runs tasks of one device in order, no faster than its pace. */
export type PacedQueue = {
  /** Runs the task now or when its turn has come; `refused` = the device is too far ahead of its rate. */
  readonly run: (task: () => void) => 'accepted' | 'refused';
  /** Runs what still waits: its sender has gone, but what arrived counts. */
  readonly flush: () => void;
};

type Waiting = { readonly dueAt: number; readonly task: () => void };

/** One queue a connection; `now` in ms. It holds a timer only while something waits. */
export function createPacedQueue(pace: DevicePace, now: () => number): PacedQueue {
  const waiting: Waiting[] = [];
  let timer: NodeJS.Timeout | undefined;

  const runDue = (until: number): void => {
    timer = undefined;
    let next = waiting[0];
    while (next !== undefined && next.dueAt <= until) {
      waiting.shift();
      next.task();
      next = waiting[0];
    }
    if (next !== undefined) timer = setTimeout(() => runDue(now()), Math.max(1, next.dueAt - now()));
  };

  return {
    run: (task) => {
      const arrivedAt = now();
      const turn = pace(arrivedAt);
      if (turn === 'refused') return 'refused';
      if (turn.waitMs === 0 && waiting.length === 0) {
        task();
        return 'accepted';
      }
      waiting.push({ dueAt: arrivedAt + turn.waitMs, task });
      timer ??= setTimeout(() => runDue(now()), Math.max(1, turn.waitMs));
      return 'accepted';
    },
    flush: () => {
      clearTimeout(timer);
      runDue(Number.POSITIVE_INFINITY);
    },
  };
}
