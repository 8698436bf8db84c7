import { useEffect, useRef } from 'react';
import { watchedPumps } from '#src/lib/live/watched-pumps.ts';

/** Asks the live connection for every reading and run of these pumps for as long as they are on screen. */
export function useWatchedPumps(pumpIds: readonly string[]): void {
  const watcher = useRef(Symbol('watcher'));
  const key = pumpIds.join();
  useEffect(() => {
    const me = watcher.current;
    watchedPumps.watch(me, key === '' ? [] : key.split(','));
  }, [key]);
  useEffect(() => {
    const me = watcher.current;
    return () => watchedPumps.release(me);
  }, []);
}
