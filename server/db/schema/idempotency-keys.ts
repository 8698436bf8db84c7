import { sql } from 'drizzle-orm';
import { index, pgTable, primaryKey, smallint, text, uuid } from 'drizzle-orm/pg-core';
import { bytes, companyId, instant } from './columns.ts';
import { appReads, appWrites, machineWorks } from './policies.ts';

const own = sql`company_id = (select millrace_company()) and user_id = (select millrace_user())`;

/** What a request with an Idempotency-Key was answered, written in the transaction of the request itself. */
export const idempotencyKeys = pgTable(
  'idempotency_keys',
  {
    companyId: companyId(),
    userId: uuid('user_id').notNull(),
    key: text().notNull(),
    /** Hash of method, path and body: the same key with another request is refused. */
    requestHash: bytes('request_hash').notNull(),
    status: smallint(),
    /** The answer, encrypted: it may hold a secret that is shown once. */
    sealedAnswer: bytes('sealed_answer'),
    createdAt: instant('created_at').notNull().defaultNow(),
  },
  (table) => [
    primaryKey({ name: 'idempotency_keys_pkey', columns: [table.userId, table.key] }),
    index('idempotency_keys_created_index').on(table.createdAt),
    appReads('idempotency_keys', own),
    ...appWrites('idempotency_keys', own),
    machineWorks('idempotency_keys'),
  ],
);
