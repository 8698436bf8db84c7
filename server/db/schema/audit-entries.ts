import { sql } from 'drizzle-orm';
import { index, jsonb, pgPolicy, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { companyId, id, instant } from './columns.ts';
import { appReads, machineWorks, managersOnly, millraceApp } from './policies.ts';

/** Who did what, when and from where. Rows are added and never changed. */
export const auditEntries = pgTable(
  'audit_entries',
  {
    id: id(),
    companyId: companyId(),
    at: instant('at').notNull(),
    actorUserId: uuid('actor_user_id'),
    actorName: text('actor_name'),
    action: text().notNull(),
    subjectKind: text('subject_kind').notNull(),
    subjectId: uuid('subject_id'),
    detail: jsonb().$type<Record<string, unknown>>().notNull().default({}),
    address: text(),
    requestId: text('request_id'),
  },
  (table) => [
    index('audit_entries_at_index').on(table.companyId, table.at),
    index('audit_entries_subject_index').on(table.subjectId),
    appReads('audit_entries', managersOnly),
    pgPolicy('audit_entries_app_inserts', {
      for: 'insert',
      to: millraceApp,
      withCheck: sql`company_id = (select millrace_company()) and actor_user_id = (select millrace_user())`,
    }),
    machineWorks('audit_entries'),
  ],
);
