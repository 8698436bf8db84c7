import { jsonb, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { companyId, instant } from './columns.ts';
import { machineWorks } from './policies.ts';

/** What the mail policy remembers of a pad and of a person: last mail, what waits for the follow-up. */
export const mailStates = pgTable(
  'mail_states',
  {
    companyId: companyId(),
    subjectKind: text('subject_kind').$type<'pad' | 'person'>().notNull(),
    subjectId: uuid('subject_id').notNull(),
    state: jsonb().$type<unknown>().notNull(),
    updatedAt: instant('updated_at').notNull().defaultNow(),
  },
  (table) => [
    primaryKey({ name: 'mail_states_pkey', columns: [table.subjectKind, table.subjectId] }),
    machineWorks('mail_states'),
  ],
);
