import { createHash } from 'node:crypto';
import type { Request } from 'express';
import { RequestError } from '#server/errors.ts';

/** The version a change was made for: a number from what was read, or `any` for `*`. */
export type ExpectedVersion = number | 'any' | undefined;

/** The body's own version, when it has one: what If-Match is compared with. */
function findVersion(body: unknown): number | undefined {
  const version = typeof body === 'object' && body !== null && 'version' in body ? body.version : undefined;
  return typeof version === 'number' ? version : undefined;
}

/** Whether the body tells the time: a stored copy of it would tell the wrong one. */
export const tellsTime = (body: unknown): boolean => typeof body === 'object' && body !== null && 'serverNow' in body;

/** A body's own `serverNow`, as it is written. */
const SERVER_NOW = /"serverNow":[\d.]+,?/;

/**
 * A weak tag: the version of the thing where it has one, and a digest of what is shown of it, the clock left out.
 * `written` is the body as JSON: a year of days is not written twice.
 *
 * @example etagOf('{"version":3,"name":"Filter pump"}', { version: 3, name: 'Filter pump' }) // 'W/"3-kGbqyD0m3zIvSx2B"'
 */
export function etagOf(written: string, body: unknown): string {
  const text = tellsTime(body) ? written.replace(SERVER_NOW, '') : written;
  const digest = createHash('sha256').update(text).digest('base64url').slice(0, 16);
  const version = findVersion(body);
  return version === undefined ? `W/"${digest}"` : `W/"${version}-${digest}"`;
}

/** Reads If-Match: the tag of what was read, as it came or its version alone. */
export function readIfMatch(request: Request, isRequired: boolean): ExpectedVersion {
  const header = request.get('If-Match');
  if (header === undefined) {
    if (!isRequired) return undefined;
    throw new RequestError('precondition-required', 'Send If-Match with the version of what you have read.');
  }
  if (header.trim() === '*') return 'any';
  const version = /^(?:W\/)?"(\d{1,9})(?:-[\w-]+)?"$/.exec(header.trim())?.[1];
  // A tag that is none of ours cannot be the present one.
  return version === undefined ? -1 : Number(version);
}

/** Refuses a change that was made for another version than the present one. */
export function requireVersion(expected: ExpectedVersion, present: number): void {
  if (expected === undefined || expected === 'any' || expected === present) return;
  throw changedMeanwhile();
}

/** Refuses a change to what somebody else has changed a moment ago. */
export const changedMeanwhile = (): RequestError =>
  new RequestError('precondition-failed', 'Somebody changed it meanwhile. Read it again, then repeat the change.');
