import { sql } from 'drizzle-orm';
import { foreignKey, index, jsonb, pgTable, real, text, unique, uuid } from 'drizzle-orm/pg-core';
import { companyId, id } from './columns.ts';
import { pads } from './pads.ts';
import { commissionedByManagers, machineWorks, staffOr } from './policies.ts';

/** One pair of trippers: local minutes, `days` Monday to Sunday. */
export type Trippers = { readonly days: readonly boolean[]; readonly onMinute: number; readonly offMinute: number };

/** A mechanical or electronic time clock on a pad. */
export const clocks = pgTable(
  'clocks',
  {
    id: id(),
    companyId: companyId(),
    padId: uuid('pad_id').notNull(),
    name: text().notNull(),
    type: text().$type<'synchronous' | 'spring-carry-over' | 'battery-carry-over' | 'electronic'>().notNull(),
    /** Whether it hangs on the motor's circuit or on its own. */
    circuit: text().$type<'motor' | 'own'>().notNull(),
    trippers: jsonb().$type<readonly Trippers[]>().notNull(),
    opensEarlyMinutes: real('opens_early_minutes').notNull().default(0),
  },
  (table) => [
    unique('clocks_company_id_id_key').on(table.companyId, table.id),
    foreignKey({
      name: 'clocks_pad_fkey',
      columns: [table.companyId, table.padId],
      foreignColumns: [pads.companyId, pads.id],
    }),
    index('clocks_pad_index').on(table.padId),
    ...commissionedByManagers('clocks', staffOr(sql`pad_id in (select o.pad_id from pad_ownerships o)`)),
    machineWorks('clocks'),
  ],
);
