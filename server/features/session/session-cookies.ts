import { findCookie } from '#server/http/cookies.ts';
import type { Exchange } from '#server/http/mount.ts';
import { ACCESS_MS } from './access-token.ts';
import { REFRESH_IDLE_MS } from './refresh-token.ts';

/**
 * Over https a browser takes `__Host-` cookies only from this very host, for all of it, and never in the clear; on
 * plain http, which is loopback, there is no such name.
 */
export type SessionCookies = {
  readonly accessName: string;
  readonly refreshName: string;
  readonly set: (response: Exchange['response'], tokens: { readonly access: string; readonly refresh: string }) => void;
  readonly clear: (response: Exchange['response']) => void;
  readonly findAccess: (cookieHeader: string | undefined) => string | undefined;
  readonly findRefresh: (cookieHeader: string | undefined) => string | undefined;
};

export function createSessionCookies(isSecure: boolean): SessionCookies {
  const prefix = isSecure ? '__Host-' : '';
  const [accessName, refreshName] = [`${prefix}millrace-access`, `${prefix}millrace-refresh`];
  const options = { httpOnly: true, sameSite: 'lax', path: '/', secure: isSecure } as const;
  return {
    accessName,
    refreshName,
    set: (response, { access, refresh }) => {
      response.cookie(accessName, access, { ...options, maxAge: ACCESS_MS });
      response.cookie(refreshName, refresh, { ...options, maxAge: REFRESH_IDLE_MS });
    },
    clear: (response) => {
      response.clearCookie(accessName, options);
      response.clearCookie(refreshName, options);
    },
    findAccess: (header) => findCookie(header, accessName),
    findRefresh: (header) => findCookie(header, refreshName),
  };
}
