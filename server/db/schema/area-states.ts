import { jsonb, pgTable } from 'drizzle-orm/pg-core';
import { companyId, instant } from './columns.ts';
import { companies } from './companies.ts';
import { machineWorks } from './policies.ts';

/** The alarms that speak for several pumps of a company, as the area fold keeps them; locked while it works. */
export const areaStates = pgTable(
  'area_states',
  {
    companyId: companyId()
      .primaryKey()
      .references(() => companies.id),
    state: jsonb().$type<unknown>().notNull(),
    updatedAt: instant('updated_at').notNull().defaultNow(),
  },
  () => [machineWorks('area_states')],
);
