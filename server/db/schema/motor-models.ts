import { integer, jsonb, pgTable, real, smallint, text, unique } from 'drizzle-orm/pg-core';
import type { MotorTraits } from '#shared/domain/control/motor-settings.ts';
import { companyId, id } from './columns.ts';
import { companies } from './companies.ts';
import { commissionedByManagers, machineWorks, ofCompanyOnly } from './policies.ts';

/** What every motor of one model shares. */
export const motorModels = pgTable(
  'motor_models',
  {
    id: id(),
    companyId: companyId().references(() => companies.id),
    name: text().notNull(),
    frame: text().notNull(),
    totalHorsepower: real('total_horsepower').notNull(),
    serviceFactor: real('service_factor').notNull(),
    inputCount: smallint('input_count').notNull(),
    /** Input numbers in the order of the terminal strip. */
    terminalOrder: jsonb('terminal_order').$type<readonly number[]>().notNull(),
    traits: jsonb().$type<MotorTraits>().notNull(),
    nominalVolts: integer('nominal_volts'),
  },
  (table) => [
    unique('motor_models_company_id_id_key').on(table.companyId, table.id),
    ...commissionedByManagers('motor_models', ofCompanyOnly),
    machineWorks('motor_models'),
  ],
);
