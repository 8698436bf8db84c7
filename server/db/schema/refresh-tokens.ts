import { foreignKey, index, pgTable, unique, uuid } from 'drizzle-orm/pg-core';
import { bytes, companyId, id, instant } from './columns.ts';
import { machineWorks } from './policies.ts';
import { users } from './users.ts';

/** Refresh tokens by their hash; one sign-in is one family. Only the machine role touches them. */
export const refreshTokens = pgTable(
  'refresh_tokens',
  {
    id: id(),
    companyId: companyId(),
    userId: uuid('user_id').notNull(),
    familyId: uuid('family_id').notNull(),
    /** When the person signed in: no family outlives its longest time, however often it is renewed. */
    signedInAt: instant('signed_in_at').notNull(),
    tokenHash: bytes('token_hash').notNull(),
    issuedAt: instant('issued_at').notNull(),
    usedAt: instant('used_at'),
    expiresAt: instant('expires_at').notNull(),
    revokedAt: instant('revoked_at'),
  },
  (table) => [
    unique('refresh_tokens_hash_key').on(table.tokenHash),
    foreignKey({
      name: 'refresh_tokens_user_fkey',
      columns: [table.companyId, table.userId],
      foreignColumns: [users.companyId, users.id],
    }),
    index('refresh_tokens_family_index').on(table.familyId),
    index('refresh_tokens_user_index').on(table.userId),
    index('refresh_tokens_expires_index').on(table.expiresAt),
    machineWorks('refresh_tokens'),
  ],
);
