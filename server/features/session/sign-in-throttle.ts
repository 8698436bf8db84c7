import { createHash } from 'node:crypto';
import type pg from 'pg';
import { RateLimiterMemory, RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible';
import { RequestError } from '#server/errors.ts';

/**
 * Slows guessing down (OWASP, authentication: a counter an account, not only an address). Few attempts for one account
 * from one address; more for one account from anywhere, so that a stranger cannot lock its owner out at once; more
 * again for one address, behind which a whole office may sit.
 */
const LIMITS = { pair: 5, account: 30, address: 60 } as const;
const WINDOW_SECONDS = 15 * 60;

export type SignInThrottle = {
  /** Counts an attempt, or refuses it with the time to wait. */
  readonly attempt: (email: string, address: string) => Promise<void>;
  /** The attempt was the right one: what was counted for the account from this address is forgotten. */
  readonly forgive: (email: string, address: string) => Promise<void>;
};

/** Counts in PostgreSQL, so that every process and every restart counts on; in memory while that does not answer. */
export function createSignInThrottle(machine: pg.Pool): SignInThrottle {
  const limiter = (keyPrefix: keyof typeof LIMITS) => {
    const limits = { keyPrefix, points: LIMITS[keyPrefix], duration: WINDOW_SECONDS };
    return new RateLimiterPostgres({
      ...limits,
      storeClient: machine,
      storeType: 'pool',
      tableName: 'sign_in_attempts',
      tableCreated: true,
      insuranceLimiter: new RateLimiterMemory(limits),
    });
  };
  const [pair, account, byAddress] = [limiter('pair'), limiter('account'), limiter('address')];
  const keysOf = (email: string, address: string) => ({
    pair: digest(`${email} ${address}`),
    account: digest(email),
    address: digest(address),
  });
  return {
    attempt: async (email, address) => {
      const keys = keysOf(email, address);
      await consume(byAddress, keys.address);
      await consume(pair, keys.pair);
      await consume(account, keys.account);
    },
    forgive: async (email, address) => {
      const keys = keysOf(email, address);
      await Promise.all([pair.delete(keys.pair), account.reward(keys.account), byAddress.reward(keys.address)]);
    },
  };
}

/** No address and no e-mail address is stored as it is, and none is too long for its column. */
const digest = (text: string): string => createHash('sha256').update(text).digest('base64url');

async function consume(limiter: RateLimiterPostgres, key: string): Promise<void> {
  try {
    await limiter.consume(key);
  } catch (refusal) {
    if (!(refusal instanceof RateLimiterRes)) throw refusal;
    const retryAfterSeconds = Math.max(1, Math.ceil(refusal.msBeforeNext / 1000));
    const minutes = Math.ceil(retryAfterSeconds / 60);
    throw new RequestError('rate-limited', `Too many attempts. Try again in ${minutes} min.`, { retryAfterSeconds });
  }
}
