import { foreignKey, integer, jsonb, pgTable, uuid } from 'drizzle-orm/pg-core';
import { companyId, instant } from './columns.ts';
import { appReads, machineWorks, ofVisiblePump } from './policies.ts';
import { pumps } from './pumps.ts';

/** What the fold has learnt about a pump: large, and written only when it changes. */
export const pumpLearnt = pgTable(
  'pump_learnt',
  {
    pumpId: uuid('pump_id').primaryKey(),
    companyId: companyId(),
    version: integer().notNull(),
    learnt: jsonb().$type<unknown>().notNull(),
    updatedAt: instant('updated_at').notNull().defaultNow(),
  },
  (table) => [
    foreignKey({
      name: 'pump_learnt_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }),
    appReads('pump_learnt', ofVisiblePump),
    machineWorks('pump_learnt'),
  ],
);
