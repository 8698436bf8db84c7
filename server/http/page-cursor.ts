import { invalid } from '#server/errors.ts';

/** The sort keys of the last row of a page. */
export type SortKeys = readonly (string | number)[];

/** Writes a place in a list, opaque to whoever passes it back. */
export const encodeCursor = (keys: SortKeys): string => Buffer.from(JSON.stringify(keys)).toString('base64url');

/**
 * Reads a cursor of this list: its keys have the types of `shape`, for instance `['number', 'string']`. Undefined for
 * none; a cursor that is not one is refused.
 */
export function decodeCursor(
  cursor: string | undefined,
  shape: readonly ('number' | 'string')[],
): SortKeys | undefined {
  if (cursor === undefined) return undefined;
  const keys = parse(cursor);
  const fits = keys?.length === shape.length && keys.every((key, index) => typeof key === shape[index]);
  if (!fits) throw invalid('query.cursor', 'is no cursor of this list; begin again without it');
  return keys.filter((key) => typeof key === 'string' || typeof key === 'number');
}

function parse(cursor: string): unknown[] | undefined {
  try {
    const keys: unknown = JSON.parse(Buffer.from(cursor, 'base64url').toString());
    return Array.isArray(keys) ? keys : undefined;
  } catch {
    return undefined;
  }
}

/** Cuts the row that was read beyond the page off, and says where the next page begins. */
export function toPage<Row>(
  rows: readonly Row[],
  limit: number,
  keysOf: (row: Row) => SortKeys,
): { items: Row[]; nextCursor: string | null } {
  const items = rows.slice(0, limit);
  const last = items.at(-1);
  return { items, nextCursor: rows.length > limit && last !== undefined ? encodeCursor(keysOf(last)) : null };
}
