import { sql } from 'drizzle-orm';
import { foreignKey, index, pgTable, real, smallint, text, uuid } from 'drizzle-orm/pg-core';
import type { EquipmentKind, Interlock } from '#shared/domain/control/pump-context.ts';
import { clocks } from './clocks.ts';
import { companyId, id } from './columns.ts';
import { pads } from './pads.ts';
import { commissionedByManagers, machineWorks, staffOr } from './policies.ts';
import { pumps } from './pumps.ts';

/** Heater, cell, feeder and the like, with what feeds it and the flow it needs. */
export const equipment = pgTable(
  'equipment',
  {
    id: id(),
    companyId: companyId(),
    padId: uuid('pad_id').notNull(),
    /** The pump whose water it needs; null = the pad's filter pump. */
    pumpId: uuid('pump_id'),
    kind: text().$type<EquipmentKind>().notNull(),
    /** The input of that pump whose clock also feeds it. */
    inputNumber: smallint('input_number'),
    clockId: uuid('clock_id'),
    interlock: text().$type<Interlock>().notNull().default('unknown'),
    minimumGpm: real('minimum_gpm'),
  },
  (table) => [
    foreignKey({
      name: 'equipment_pad_fkey',
      columns: [table.companyId, table.padId],
      foreignColumns: [pads.companyId, pads.id],
    }),
    foreignKey({
      name: 'equipment_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }),
    foreignKey({
      name: 'equipment_clock_fkey',
      columns: [table.companyId, table.clockId],
      foreignColumns: [clocks.companyId, clocks.id],
    }),
    index('equipment_pad_index').on(table.padId),
    ...commissionedByManagers('equipment', staffOr(sql`pad_id in (select o.pad_id from pad_ownerships o)`)),
    machineWorks('equipment'),
  ],
);
