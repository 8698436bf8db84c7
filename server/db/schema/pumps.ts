import { sql } from 'drizzle-orm';
import { boolean, foreignKey, index, integer, jsonb, pgTable, real, text, unique, uuid } from 'drizzle-orm/pg-core';
import type { MotorSettings } from '#shared/domain/control/motor-settings.ts';
import { companyId, id, instant } from './columns.ts';
import { pads } from './pads.ts';
import { commissionedByManagers, machineWorks, staffOr } from './policies.ts';
import { wetEndModels } from './wet-end-models.ts';

/** A pump of a pad: a wet end with whatever motor and device are fitted to it now. */
export const pumps = pgTable(
  'pumps',
  {
    id: id(),
    companyId: companyId(),
    /** The short key under which readings lie: four bytes in a row that is written ten thousand times a day. */
    number: integer().generatedAlwaysAsIdentity().notNull(),
    padId: uuid('pad_id').notNull(),
    name: text().notNull(),
    purpose: text().$type<'filter' | 'booster' | 'spa' | 'feature'>().notNull().default('filter'),
    /** Some pumps are only listed. */
    monitored: boolean().notNull().default(true),
    wetEndModelId: uuid('wet_end_model_id'),
    /** System curve, ft per gpm². */
    systemK: real('system_k'),
    /** Volts measured at start-up; null = the motor model's nameplate. */
    nominalVolts: real('nominal_volts'),
    /** Commissioned settings of the motor. */
    settings: jsonb().$type<MotorSettings>().notNull(),
    settingsVersion: integer('settings_version').notNull().default(1),
    createdAt: instant('created_at').notNull().defaultNow(),
  },
  (table) => [
    unique('pumps_number_key').on(table.number),
    unique('pumps_company_id_id_key').on(table.companyId, table.id),
    foreignKey({
      name: 'pumps_pad_fkey',
      columns: [table.companyId, table.padId],
      foreignColumns: [pads.companyId, pads.id],
    }),
    foreignKey({
      name: 'pumps_wet_end_model_fkey',
      columns: [table.companyId, table.wetEndModelId],
      foreignColumns: [wetEndModels.companyId, wetEndModels.id],
    }),
    index('pumps_pad_index').on(table.padId),
    // Rules ask for all numbers of a company; this index answers without the wide rows.
    index('pumps_company_numbers_index').on(table.companyId, table.number, table.padId, table.id),
    ...commissionedByManagers('pumps', staffOr(sql`pad_id in (select o.pad_id from pad_ownerships o)`)),
    machineWorks('pumps'),
  ],
);
