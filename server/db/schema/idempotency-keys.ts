import { sql } from 'drizzle-orm';
import { index, jsonb, pgTable, primaryKey, smallint, text, uuid } from 'drizzle-orm/pg-core';
import { companyId, hash, instant } from './columns.ts';
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
    requestHash: hash('request_hash').notNull(),
    status: smallint(),
    response: jsonb().$type<unknown>(),
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
