import { sql } from 'drizzle-orm';
import { check, foreignKey, pgTable, smallint, text, unique, uuid } from 'drizzle-orm/pg-core';
import type { InputDuty, InputKind } from '#shared/domain/control/pump-context.ts';
import { clocks } from './clocks.ts';
import { companyId, id } from './columns.ts';
import { commissionedByManagers, machineWorks, ofVisiblePump } from './policies.ts';
import { pumps } from './pumps.ts';

/** A wired speed input of a pump's motor, counted from 1. */
export const inputs = pgTable(
  'inputs',
  {
    id: id(),
    companyId: companyId(),
    pumpId: uuid('pump_id').notNull(),
    number: smallint().notNull(),
    kind: text().$type<InputKind>().notNull(),
    drives: text().$type<InputDuty>(),
    clockId: uuid('clock_id'),
    /** How the wire is marked. */
    wire: text(),
  },
  (table) => [
    unique('inputs_pump_number_key').on(table.pumpId, table.number),
    foreignKey({
      name: 'inputs_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }),
    foreignKey({
      name: 'inputs_clock_fkey',
      columns: [table.companyId, table.clockId],
      foreignColumns: [clocks.companyId, clocks.id],
    }),
    check('inputs_number', sql`number between 1 and 8`),
    ...commissionedByManagers('inputs', ofVisiblePump),
    machineWorks('inputs'),
  ],
);
