import { jsonb, pgTable, real, text, unique } from 'drizzle-orm/pg-core';
import type { WetEndPoint } from '#shared/domain/control/pump-context.ts';
import { companyId, id } from './columns.ts';
import { companies } from './companies.ts';
import { commissionedByManagers, machineWorks, ofCompanyOnly } from './policies.ts';

/** A wet end's curve: flow, head and watts at one speed. */
export const wetEndModels = pgTable(
  'wet_end_models',
  {
    id: id(),
    companyId: companyId().references(() => companies.id),
    name: text().notNull(),
    referenceRpm: real('reference_rpm').notNull(),
    points: jsonb().$type<readonly WetEndPoint[]>().notNull(),
    standbyWatts: real('standby_watts').notNull(),
  },
  (table) => [
    unique('wet_end_models_company_id_id_key').on(table.companyId, table.id),
    ...commissionedByManagers('wet_end_models', ofCompanyOnly),
    machineWorks('wet_end_models'),
  ],
);
