import { sql } from 'drizzle-orm';
import { jsonb, pgTable, text } from 'drizzle-orm/pg-core';
import { id, instant } from './columns.ts';
import { appReads, machineWorks } from './policies.ts';

/** Local minutes between which mail that is not urgent may leave; `days` runs Monday to Sunday. */
export type MailHours = { readonly days: readonly boolean[]; readonly fromMinute: number; readonly toMinute: number };

/** A tenant. */
export const companies = pgTable(
  'companies',
  {
    id: id(),
    name: text().notNull(),
    /** IANA name. */
    zone: text().notNull(),
    phone: text(),
    mailHours: jsonb('mail_hours').$type<MailHours>().notNull(),
    /** What the company changed of the alarm rules' defaults, by detector. */
    rules: jsonb().$type<Record<string, unknown>>().notNull().default({}),
    createdAt: instant('created_at').notNull().defaultNow(),
  },
  () => [appReads('companies', sql`id = (select millrace_company())`), machineWorks('companies')],
);
