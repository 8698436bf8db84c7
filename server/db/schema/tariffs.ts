import { integer, jsonb, pgTable, text, unique } from 'drizzle-orm/pg-core';
import type { Tariff } from '#shared/domain/energy/tariff.ts';
import { companyId, id, instant } from './columns.ts';
import { companies } from './companies.ts';
import { commissionedByManagers, machineWorks, ofCompanyOnly } from './policies.ts';

/** What a kWh costs when: free of faults, or it is not stored. */
export const tariffs = pgTable(
  'tariffs',
  {
    id: id(),
    companyId: companyId().references(() => companies.id),
    name: text().notNull(),
    tariff: jsonb().$type<Tariff>().notNull(),
    changedAt: instant('changed_at').notNull().defaultNow(),
    version: integer().notNull().default(1),
  },
  (table) => [
    unique('tariffs_company_id_id_key').on(table.companyId, table.id),
    unique('tariffs_name_key').on(table.companyId, table.name),
    ...commissionedByManagers('tariffs', ofCompanyOnly),
    machineWorks('tariffs'),
  ],
);
