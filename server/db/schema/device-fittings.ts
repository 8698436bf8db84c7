import { sql } from 'drizzle-orm';
import { check, foreignKey, pgTable, uuid } from 'drizzle-orm/pg-core';
import { companyId, id, instant } from './columns.ts';
import { devices } from './devices.ts';
import { commissionedByManagers, machineWorks, ofVisiblePump } from './policies.ts';
import { pumps } from './pumps.ts';

/** Which device reported which pump, half-open in time; one at a time on either side (exclusion constraints). */
export const deviceFittings = pgTable(
  'device_fittings',
  {
    id: id(),
    companyId: companyId(),
    deviceId: uuid('device_id').notNull(),
    pumpId: uuid('pump_id').notNull(),
    startsAt: instant('starts_at').notNull(),
    endsAt: instant('ends_at'),
  },
  (table) => [
    foreignKey({
      name: 'device_fittings_device_fkey',
      columns: [table.companyId, table.deviceId],
      foreignColumns: [devices.companyId, devices.id],
    }),
    foreignKey({
      name: 'device_fittings_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }),
    check('device_fittings_order', sql`ends_at is null or ends_at > starts_at`),
    ...commissionedByManagers('device_fittings', ofVisiblePump),
    machineWorks('device_fittings'),
  ],
);
