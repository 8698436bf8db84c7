import { createStore, type Store } from '../store.ts';

/** The largest watch list the contract takes. */
const MOST_WATCHED = 500;

/** Who on the page watches which pumps; the socket asks for all of them together. */
export type WatchRegistry = {
  /** Replaces what one watcher asks for. */
  readonly watch: (watcher: symbol, pumpIds: readonly string[]) => void;
  readonly release: (watcher: symbol) => void;
  readonly watched: Store<readonly string[]>;
};

export function createWatchRegistry(): WatchRegistry {
  const watchers = new Map<symbol, readonly string[]>();
  const watched = createStore<readonly string[]>([]);
  const gather = () => watched.set([...new Set([...watchers.values()].flat())].slice(0, MOST_WATCHED).sort());
  return {
    watch: (watcher, pumpIds) => {
      watchers.set(watcher, pumpIds);
      gather();
    },
    release: (watcher) => {
      if (watchers.delete(watcher)) gather();
    },
    watched,
  };
}
