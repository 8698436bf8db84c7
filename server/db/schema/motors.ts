import { sql } from 'drizzle-orm';
import { foreignKey, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core';
import { companyId, id, instant } from './columns.ts';
import { motorModels } from './motor-models.ts';
import { commissionedByManagers, machineWorks, staffOr } from './policies.ts';

/** One motor unit, whichever pump it drives. */
export const motors = pgTable(
  'motors',
  {
    id: id(),
    companyId: companyId(),
    modelId: uuid('model_id').notNull(),
    serial: text().notNull(),
    dateCode: text('date_code'),
    warrantyEndsAt: instant('warranty_ends_at'),
  },
  (table) => [
    unique('motors_company_id_id_key').on(table.companyId, table.id),
    unique('motors_serial_key').on(table.companyId, table.serial),
    foreignKey({
      name: 'motors_model_fkey',
      columns: [table.companyId, table.modelId],
      foreignColumns: [motorModels.companyId, motorModels.id],
    }),
    ...commissionedByManagers('motors', staffOr(sql`id in (select f.motor_id from motor_fittings f)`)),
    machineWorks('motors'),
  ],
);
