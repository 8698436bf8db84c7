import { sql } from 'drizzle-orm';
import { boolean, foreignKey, integer, jsonb, pgTable, unique, uuid } from 'drizzle-orm/pg-core';
import { companyId, id } from './columns.ts';
import { companies } from './companies.ts';
import { pads } from './pads.ts';
import { commissionedByManagers, machineWorks, staffOr } from './policies.ts';

/** Which tariffs hold at a pad, or (`pad_id` null) at every pad of the company without a plan of its own. */
export const tariffPlans = pgTable(
  'tariff_plans',
  {
    id: id(),
    companyId: companyId().references(() => companies.id),
    padId: uuid('pad_id'),
    /** Nothing but the pad hangs on the meter: its fixed charge is the pad's. */
    ownMeter: boolean('own_meter').notNull().default(false),
    /** kWh that the rest of the meter uses a month, by period: tiers begin above it. */
    otherKwhByPeriod: jsonb('other_kwh_by_period').$type<readonly number[]>().notNull().default([]),
    version: integer().notNull().default(1),
  },
  (table) => [
    unique('tariff_plans_company_id_id_key').on(table.companyId, table.id),
    unique('tariff_plans_pad_key').on(table.companyId, table.padId).nullsNotDistinct(),
    foreignKey({
      name: 'tariff_plans_pad_fkey',
      columns: [table.companyId, table.padId],
      foreignColumns: [pads.companyId, pads.id],
    }),
    ...commissionedByManagers(
      'tariff_plans',
      staffOr(sql`(pad_id is null or pad_id in (select o.pad_id from pad_ownerships o))`),
    ),
    machineWorks('tariff_plans'),
  ],
);
