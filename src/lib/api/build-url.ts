/** What a query string can carry; a list is joined by commas as the contract's listParam reads it. */
export type QueryValue = string | number | boolean | readonly string[] | undefined;

/**
 * Fills the `:name` places of an endpoint's path and adds the query; a value that is undefined or empty is left out.
 *
 * @example buildUrl('/api/pumps/:pumpId', { pumpId: 'a b' }, { from: 1 }) // '/api/pumps/a%20b?from=1'
 */
export function buildUrl(
  path: string,
  params: Readonly<Record<string, string>>,
  query: Readonly<Record<string, QueryValue>>,
): string {
  const filled = path.replaceAll(/:(\w+)/g, (_, name: string) => encodeURIComponent(params[name] ?? ''));
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(query)) {
    if (value === undefined || value === '') continue;
    search.set(name, typeof value === 'object' ? value.join(',') : String(value));
  }
  const text = search.toString();
  return text === '' ? filled : `${filled}?${text}`;
}
