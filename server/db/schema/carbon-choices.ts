import { integer, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { companies } from './companies.ts';
import { commissionedByManagers, machineWorks, ofCompanyOnly } from './policies.ts';

/** The grid whose emission factors a company uses; null = none is shown. */
export const carbonChoices = pgTable(
  'carbon_choices',
  {
    companyId: uuid('company_id')
      .primaryKey()
      .references(() => companies.id),
    region: text(),
    version: integer().notNull().default(1),
  },
  () => [...commissionedByManagers('carbon_choices', ofCompanyOnly), machineWorks('carbon_choices')],
);
