import { sql } from 'drizzle-orm';
import { check, date, foreignKey, index, pgTable, primaryKey, uuid } from 'drizzle-orm/pg-core';
import { companyId } from './columns.ts';
import { commissionedByManagers, machineWorks, staffOr } from './policies.ts';
import { tariffPlans } from './tariff-plans.ts';
import { tariffs } from './tariffs.ts';

/** From which local day on (to before which) a plan's tariff holds, without a hole between them; the last has no end. */
export const tariffTerms = pgTable(
  'tariff_terms',
  {
    planId: uuid('plan_id').notNull(),
    companyId: companyId(),
    tariffId: uuid('tariff_id').notNull(),
    fromDay: date('from_day', { mode: 'string' }).notNull(),
    toDay: date('to_day', { mode: 'string' }),
  },
  (table) => [
    primaryKey({ name: 'tariff_terms_pkey', columns: [table.planId, table.fromDay] }),
    foreignKey({
      name: 'tariff_terms_plan_fkey',
      columns: [table.companyId, table.planId],
      foreignColumns: [tariffPlans.companyId, tariffPlans.id],
    }),
    foreignKey({
      name: 'tariff_terms_tariff_fkey',
      columns: [table.companyId, table.tariffId],
      foreignColumns: [tariffs.companyId, tariffs.id],
    }),
    index('tariff_terms_tariff_index').on(table.tariffId),
    check('tariff_terms_order', sql`to_day is null or to_day > from_day`),
    ...commissionedByManagers('tariff_terms', staffOr(sql`plan_id in (select p.id from tariff_plans p)`)),
    machineWorks('tariff_terms'),
  ],
);
