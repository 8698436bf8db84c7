/** Reads one cookie of a Cookie header; the first wins where a name comes twice. Undefined where it is missing. */
export function findCookie(header: string | undefined, name: string): string | undefined {
  for (const pair of header?.split(';') ?? []) {
    const equals = pair.indexOf('=');
    if (equals > 0 && pair.slice(0, equals).trim() === name) return pair.slice(equals + 1).trim();
  }
  return undefined;
}
