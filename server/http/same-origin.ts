import type { IncomingHttpHeaders } from 'node:http';
import type { RequestHandler } from 'express';
import { RequestError } from '#server/errors.ts';

const SAFE_METHODS = ['GET', 'HEAD', 'OPTIONS'];

/**
 * Whether a request comes from a page of ours, by what the browser says and a page cannot forge (OWASP, cross-site
 * request forgery: Fetch Metadata first, Origin where it is missing). Undefined when it says neither: no browser.
 */
export function isFromOwnPage(headers: IncomingHttpHeaders, publicUrl: string): boolean | undefined {
  const site = headers['sec-fetch-site'];
  const { origin, host } = headers;
  if (typeof site === 'string') return site === 'same-origin' || site === 'none';
  if (origin === undefined) return undefined;
  return origin === publicUrl || (URL.canParse(origin) && new URL(origin).host === host);
}

/** Refuses changes that another site's page asks for with a person's cookies. */
export const refuseOtherSites =
  (publicUrl: string): RequestHandler =>
  ({ method, headers }, _response, next) => {
    if (SAFE_METHODS.includes(method)) return next();
    const isOwn = isFromOwnPage(headers, publicUrl);
    if (isOwn === false) throw new RequestError('forbidden', 'Changes are taken from pages of this site only.');
    if (isOwn === undefined && headers.cookie !== undefined) {
      throw new RequestError('forbidden', `A program that sends cookies must also send Origin: ${publicUrl}`);
    }
    next();
  };
