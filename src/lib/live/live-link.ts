import { createStore } from '../store.ts';
import type { LinkState } from './link-state.ts';

/** How the live connection is, for the indicator in the header and for strips that fade. */
export const liveLink = createStore<LinkState>({ phase: 'connecting', heardAt: undefined });
