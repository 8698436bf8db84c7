import { foreignKey, jsonb, pgTable, primaryKey, uuid } from 'drizzle-orm/pg-core';
import { backtests } from './backtests.ts';
import { companyId } from './columns.ts';
import { appReads, machineWorks, managersOnly } from './policies.ts';
import { pumps } from './pumps.ts';

/** What a backtest found on one pump: written when the pump is done, so that another worker goes on from there. */
export const backtestPumps = pgTable(
  'backtest_pumps',
  {
    companyId: companyId(),
    backtestId: uuid('backtest_id').notNull(),
    pumpId: uuid('pump_id').notNull(),
    outcome: jsonb().$type<unknown>().notNull(),
  },
  (table) => [
    primaryKey({ name: 'backtest_pumps_pkey', columns: [table.backtestId, table.pumpId] }),
    foreignKey({
      name: 'backtest_pumps_backtest_fkey',
      columns: [table.companyId, table.backtestId],
      foreignColumns: [backtests.companyId, backtests.id],
    }).onDelete('cascade'),
    foreignKey({
      name: 'backtest_pumps_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }).onDelete('cascade'),
    appReads('backtest_pumps', managersOnly),
    machineWorks('backtest_pumps'),
  ],
);
