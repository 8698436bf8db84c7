/** Rows from `first` up to but not including `end`. */
export type RowRange = { readonly first: number; readonly end: number };

/**
 * Which rows of equal height (px) of a long list are on or near the screen. `listTop` is the list's top edge seen from
 * the screen's, negative once it has been scrolled past; `spare` rows are kept ready on either side.
 *
 * @example visibleRange({ listTop: -640, screen: 640, height: 64, count: 1000, spare: 0 }) // { first: 10, end: 20 }
 */
export function visibleRange(list: {
  readonly listTop: number;
  readonly screen: number;
  readonly height: number;
  readonly count: number;
  readonly spare: number;
}): RowRange {
  const { listTop, screen, height, count, spare } = list;
  const first = Math.max(0, Math.floor(-listTop / height) - spare);
  const end = Math.min(count, Math.ceil((screen - listTop) / height) + spare);
  return { first: Math.min(first, count), end: Math.max(end, Math.min(first, count)) };
}
