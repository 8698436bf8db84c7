import { sql } from 'drizzle-orm';
import { check, foreignKey, pgTable, uuid } from 'drizzle-orm/pg-core';
import { companyId, id, instant } from './columns.ts';
import { motors } from './motors.ts';
import { commissionedByManagers, machineWorks, ofVisiblePump } from './policies.ts';
import { pumps } from './pumps.ts';

/** Which motor drove which pump, half-open in time; one at a time on either side (exclusion constraints). */
export const motorFittings = pgTable(
  'motor_fittings',
  {
    id: id(),
    companyId: companyId(),
    motorId: uuid('motor_id').notNull(),
    pumpId: uuid('pump_id').notNull(),
    startsAt: instant('starts_at').notNull(),
    endsAt: instant('ends_at'),
  },
  (table) => [
    foreignKey({
      name: 'motor_fittings_motor_fkey',
      columns: [table.companyId, table.motorId],
      foreignColumns: [motors.companyId, motors.id],
    }),
    foreignKey({
      name: 'motor_fittings_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }),
    check('motor_fittings_order', sql`ends_at is null or ends_at > starts_at`),
    ...commissionedByManagers('motor_fittings', ofVisiblePump),
    machineWorks('motor_fittings'),
  ],
);
