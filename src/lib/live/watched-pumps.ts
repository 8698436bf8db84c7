import { createWatchRegistry } from './watch-registry.ts';

/** What is on screen now, all pages' components together. */
export const watchedPumps = createWatchRegistry();
