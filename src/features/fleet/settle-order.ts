/**
 * Rows in the order that is on screen, so that nothing moves under a pointer: what is gone leaves, what is new comes
 * last. `moved` says that the true order is another one.
 *
 * @example settleOrder(['a', 'b'], [{ id: 'b' }, { id: 'a' }], ({ id }) => id).moved // true
 */
export function settleOrder<Row>(
  held: readonly string[],
  rows: readonly Row[],
  idOf: (row: Row) => string,
): { readonly rows: readonly Row[]; readonly moved: boolean } {
  const byId = new Map(rows.map((row) => [idOf(row), row]));
  const known = new Set(held);
  const stayed = held.flatMap((id) => byId.get(id) ?? []);
  const settled = [...stayed, ...rows.filter((row) => !known.has(idOf(row)))];
  return { rows: settled, moved: settled.some((row, index) => row !== rows[index]) };
}
