import { sql } from 'drizzle-orm';
import { foreignKey, integer, jsonb, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import type { PumpNow } from '#shared/domain/fold/fold-output.ts';
import { companyId, instant, sequenceNumber, xid8 } from './columns.ts';
import { appReads, machineWorks, ofVisiblePumpSince } from './policies.ts';
import { pumps } from './pumps.ts';

/**
 * One row a pump, written with every fold: the cursor, the hot state and the pump this instant. `changed_in` bears no
 * index on purpose: an update that touches no index stays in its page.
 */
export const pumpStates = pgTable(
  'pump_states',
  {
    pumpId: uuid('pump_id').primaryKey(),
    companyId: companyId(),
    pumpNumber: integer('pump_number').notNull(),
    /** Fences the process that folds the pump. */
    epoch: integer().notNull().default(0),
    /** Arrival sequence of the last event folded. */
    cursor: sequenceNumber('cursor').notNull().default(0),
    /** The fold's small state, opaque here. */
    hot: jsonb().$type<unknown>(),
    now: jsonb().$type<PumpNow>(),
    /** Device time of the last reading folded. */
    highWater: instant('high_water'),
    heardAt: instant('heard_at'),
    silentSince: instant('silent_since'),
    /** When its device's connection dropped, by its will. */
    lostAt: instant('lost_at'),
    quarantinedAt: instant('quarantined_at'),
    quarantineReason: text('quarantine_reason'),
    changedIn: xid8('changed_in').notNull().default(sql`pg_current_xact_id()`),
  },
  (table) => [
    foreignKey({
      name: 'pump_states_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }),
    appReads('pump_states', ofVisiblePumpSince('heard_at')),
    machineWorks('pump_states'),
  ],
);
