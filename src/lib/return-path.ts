/**
 * Where to go after signing in: the page asked for, if it is one of ours. Anything else (another site, a protocol
 * trick, the sign-in page itself) falls back to the first page.
 *
 * @example readReturnPath('/alarms/7') // '/alarms/7'
 * @example readReturnPath('//elsewhere.example') // '/'
 */
export function readReturnPath(to: string | null): string {
  if (to === null || !to.startsWith('/')) return '/';
  try {
    const url = new URL(to, 'http://here.invalid');
    const ours =
      url.host === 'here.invalid' && !url.pathname.startsWith('/sign-in') && !url.pathname.startsWith('/api/');
    return ours ? url.pathname + url.search + url.hash : '/';
  } catch {
    return '/';
  }
}
