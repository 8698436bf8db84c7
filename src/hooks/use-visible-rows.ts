import { type RefObject, useSyncExternalStore } from 'react';
import { type RowRange, visibleRange } from './visible-range.ts';

const print = typeof matchMedia === 'undefined' ? undefined : matchMedia('print');

const subscribe = (listener: () => void) => {
  addEventListener('scroll', listener, { passive: true });
  addEventListener('resize', listener);
  print?.addEventListener('change', listener);
  return () => {
    removeEventListener('scroll', listener);
    removeEventListener('resize', listener);
    print?.removeEventListener('change', listener);
  };
};

/** More than anybody would print. */
const MOST_PRINTED = 500;
/** Rows kept ready above and below the screen, and the step in which the range moves. */
const SPARE = 6;
const STEP = 3;

/** The rows of a long list that are on or near the screen; on paper all of them, up to five hundred. */
export function useVisibleRows(list: RefObject<HTMLElement | null>, count: number, height: number): RowRange {
  const place = useSyncExternalStore(subscribe, () => {
    if (print?.matches === true) return 'print';
    const top = list.current?.getBoundingClientRect().top ?? 0;
    // In steps, or each pixel scrolled would render the list again.
    return `${Math.floor(top / (height * STEP)) * height * STEP} ${innerHeight}`;
  });
  if (place === 'print') return { first: 0, end: Math.min(count, MOST_PRINTED) };
  const [listTop = 0, screen = 0] = place.split(' ').map(Number);
  return visibleRange({ listTop, screen, height, count, spare: SPARE });
}
