import { useSyncExternalStore } from 'react';
import type { Store } from '#src/lib/store.ts';

/** The value of a store, rendered again whenever it changes. */
export const useStore = <Value>(store: Store<Value>): Value => useSyncExternalStore(store.subscribe, store.get);
