import { createStore } from '#src/lib/store.ts';

/** Counts up whenever an alarm may have changed which pump is worst. */
export const orderNews = createStore(0);
