import { createHmac, randomBytes } from 'node:crypto';

/** A refresh token not used for this long is over. */
export const REFRESH_IDLE_MS = 14 * 86_400_000;

/** However often it is renewed, a session ends this long after signing in. */
export const SESSION_LONGEST_MS = 90 * 86_400_000;

/** The same token may be shown again within this time: an answer was lost, or two tabs renewed at once. */
export const REUSE_WINDOW_MS = 10_000;

/** 256 random bits. */
export const newRefreshToken = (): string => randomBytes(32).toString('base64url');

/** What is stored of a token. */
export const hashRefreshToken = (tokenKey: string, token: string): Buffer =>
  createHmac('sha256', tokenKey).update(`millrace refresh ${token}`).digest();

/**
 * The token that follows one. It is worked out, not drawn, so that the same token shown twice within the reuse window
 * is given the same successor, though only hashes are stored.
 */
export const succeed = (tokenKey: string, token: string): string =>
  createHmac('sha256', tokenKey).update(`millrace refresh successor ${token}`).digest('base64url');
