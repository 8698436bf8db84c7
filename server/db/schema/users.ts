import { sql } from 'drizzle-orm';
import { foreignKey, index, jsonb, pgPolicy, pgTable, text, unique, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import type { Preferences } from '#shared/contract/http/session.ts';
import type { Role } from '#shared/contract/primitives.ts';
import { companyId, id, instant } from './columns.ts';
import { companies } from './companies.ts';
import { customers } from './customers.ts';
import { appReads, machineWorks, millraceApp, staffOr } from './policies.ts';

/** A person who can sign in. Through the app role `password_hash` cannot be read at all. */
export const users = pgTable(
  'users',
  {
    id: id(),
    companyId: companyId().references(() => companies.id),
    email: text().notNull(),
    name: text().notNull(),
    phone: text(),
    role: text().$type<Role>().notNull(),
    /** Whose pads a homeowner sees; null for staff. */
    customerId: uuid('customer_id'),
    passwordHash: text('password_hash').notNull(),
    preferences: jsonb().$type<Partial<Preferences>>().notNull().default({}),
    createdAt: instant('created_at').notNull().defaultNow(),
    disabledAt: instant('disabled_at'),
  },
  (table) => [
    uniqueIndex('users_email_key').on(sql`lower(${table.email})`),
    unique('users_company_id_id_key').on(table.companyId, table.id),
    foreignKey({
      name: 'users_customer_fkey',
      columns: [table.companyId, table.customerId],
      foreignColumns: [customers.companyId, customers.id],
    }),
    index('users_customer_index').on(table.customerId),
    appReads('users', staffOr(sql`id = (select millrace_user()) or id in (select p.technician_id from pads p)`)),
    pgPolicy('users_app_updates', {
      for: 'update',
      to: millraceApp,
      using: sql`company_id = (select millrace_company()) and id = (select millrace_user())`,
      withCheck: sql`company_id = (select millrace_company()) and id = (select millrace_user())`,
    }),
    machineWorks('users'),
  ],
);
