import { useSyncExternalStore } from 'react';
import { serverNow } from '#src/lib/server-clock.ts';

/** One timer for a whole page, however many rows show "ago"; it stands still while nobody looks. */
const listeners = new Set<() => void>();
let timer: ReturnType<typeof setInterval> | undefined;

const subscribe = (listener: () => void) => {
  listeners.add(listener);
  timer ??= setInterval(() => {
    for (const each of [...listeners]) each();
  }, 1000);
  return () => {
    listeners.delete(listener);
    if (listeners.size > 0) return;
    clearInterval(timer);
    timer = undefined;
  };
};

/** The server's time in ms, in whole steps: a component renders again only when a step has passed. */
export function useNow(stepMs: number): number {
  return useSyncExternalStore(subscribe, () => Math.floor(serverNow() / stepMs) * stepMs);
}
