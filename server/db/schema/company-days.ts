import { date, doublePrecision, foreignKey, integer, pgTable, primaryKey } from 'drizzle-orm/pg-core';
import { companyId } from './columns.ts';
import { companies } from './companies.ts';
import { appReads, machineWorks, managersOnly } from './policies.ts';

/** A local day of all pumps of a company together: watt-hours by wall-clock hour, 0 to 23. */
export const companyDays = pgTable(
  'company_days',
  {
    companyId: companyId(),
    day: date({ mode: 'string' }).notNull(),
    pumps: integer().notNull(),
    wattHours: doublePrecision('watt_hours').notNull(),
    /** Null = no reading of any pump covers it. */
    hourWattHours: doublePrecision('hour_watt_hours').array().notNull(),
  },
  (table) => [
    primaryKey({ name: 'company_days_pkey', columns: [table.companyId, table.day] }),
    foreignKey({
      name: 'company_days_company_fkey',
      columns: [table.companyId],
      foreignColumns: [companies.id],
    }),
    appReads('company_days', managersOnly),
    machineWorks('company_days'),
  ],
);
