/** Keeps the cookies of one browser, as far as a test needs them: set, replaced, cleared. */
export type CookieJar = {
  readonly take: (headers: Headers) => void;
  readonly header: () => Record<string, string>;
  readonly find: (name: string) => string | undefined;
  /** A jar of its own with the cookies as they are now. */
  readonly copy: () => CookieJar;
};

export function createCookieJar(cookies = new Map<string, string>()): CookieJar {
  return {
    take: (headers) => {
      for (const line of headers.getSetCookie()) {
        const [pair = ''] = line.split(';');
        const equals = pair.indexOf('=');
        const [name, value] = [pair.slice(0, equals), pair.slice(equals + 1)];
        if (value === '') cookies.delete(name);
        else cookies.set(name, value);
      }
    },
    header: () => (cookies.size === 0 ? {} : { Cookie: [...cookies].map((pair) => pair.join('=')).join('; ') }),
    find: (name) => cookies.get(name),
    copy: () => createCookieJar(new Map(cookies)),
  };
}
