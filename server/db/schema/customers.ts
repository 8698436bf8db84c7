import { sql } from 'drizzle-orm';
import { index, pgTable, text, unique } from 'drizzle-orm/pg-core';
import { companyId, id, instant } from './columns.ts';
import { companies } from './companies.ts';
import { commissionedByManagers, machineWorks, staffOr } from './policies.ts';

/** Whom the company serves. */
export const customers = pgTable(
  'customers',
  {
    id: id(),
    companyId: companyId().references(() => companies.id),
    name: text().notNull(),
    phone: text(),
    email: text(),
    createdAt: instant('created_at').notNull().defaultNow(),
  },
  (table) => [
    unique('customers_company_id_id_key').on(table.companyId, table.id),
    index('customers_name_index').on(table.companyId, table.name),
    ...commissionedByManagers('customers', staffOr(sql`id = (select millrace_customer())`)),
    machineWorks('customers'),
  ],
);
