import type { Logger } from 'pino';
import type { Role } from '#shared/contract/primitives.ts';
import type { Transaction } from './db/transaction.ts';

/** Who asks. `sessionId` is the family of their refresh tokens. */
export type Actor = {
  readonly userId: string;
  readonly companyId: string;
  readonly role: Role;
  /** Whose pads a homeowner sees. */
  readonly customerId: string | undefined;
  readonly name: string;
  readonly sessionId: string;
  /** When their access token ends, ms. */
  readonly accessUntil: number;
};

/** What every verb gets: who asks, a transaction in which they see only what is theirs, and the time. */
export type Context = {
  readonly actor: Actor;
  readonly db: Transaction;
  /** The server's clock when the request came, ms. */
  readonly now: number;
  readonly log: Logger;
  readonly requestId: string;
  readonly address: string | undefined;
};
