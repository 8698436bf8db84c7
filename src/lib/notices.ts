import { createStore, type Store } from './store.ts';

/** One line at the foot of the page about what was just done, with the way back from it. */
export type PageNotice = {
  readonly id: number;
  readonly text: string;
  readonly action?: { readonly label: string; readonly name: string; readonly run: () => void };
  readonly trouble?: boolean;
};

export const noticeStore: Store<PageNotice | undefined> = createStore<PageNotice | undefined>(undefined);

let lastId = 0;

/** Shows a notice in place of the one before; it is read out, and goes away by itself or by being closed. */
export function showNotice(notice: Omit<PageNotice, 'id'>): void {
  lastId += 1;
  noticeStore.set({ ...notice, id: lastId });
}

export const closeNotice = (): void => noticeStore.set(undefined);
