import { sql } from 'drizzle-orm';
import { foreignKey, index, pgTable, uuid } from 'drizzle-orm/pg-core';
import { companyId, instant } from './columns.ts';
import { appReads, machineWorks, ofVisiblePump } from './policies.ts';
import { pumps } from './pumps.ts';

/** How far a pump's readings are rolled up, written with the days they went into. */
export const rollupCursors = pgTable(
  'rollup_cursors',
  {
    pumpId: uuid('pump_id').primaryKey(),
    companyId: companyId(),
    /** Device time up to which everything folded is counted in. */
    rolledTo: instant('rolled_to').notNull(),
    rolledAt: instant('rolled_at').notNull().default(sql`now()`),
  },
  (table) => [
    foreignKey({
      name: 'rollup_cursors_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }),
    index('rollup_cursors_age_index').on(table.rolledAt),
    appReads('rollup_cursors', ofVisiblePump),
    machineWorks('rollup_cursors'),
  ],
);
