import { sql } from 'drizzle-orm';
import { foreignKey, index, pgTable, real, smallint, text, unique, uuid } from 'drizzle-orm/pg-core';
import type { PadState } from '#shared/domain/control/pump-context.ts';
import { companyId, id, instant } from './columns.ts';
import { companies } from './companies.ts';
import { commissionedByManagers, machineWorks, staffOr } from './policies.ts';
import { users } from './users.ts';

/** An equipment pad: where the pumps of one pool stand. */
export const pads = pgTable(
  'pads',
  {
    id: id(),
    companyId: companyId().references(() => companies.id),
    name: text().notNull(),
    street: text().notNull(),
    town: text(),
    /** A neighbourhood: pads of one area share the utility's feeders. */
    area: text(),
    zone: text().notNull(),
    state: text().$type<PadState>().notNull().default('open'),
    accessNotes: text('access_notes'),
    poolGallons: real('pool_gallons'),
    turnoversPerDay: real('turnovers_per_day'),
    technicianId: uuid('technician_id'),
    /** Weekday of the route's stop, 1 = Monday to 7; null = not on a route. */
    stopWeekday: smallint('stop_weekday'),
    createdAt: instant('created_at').notNull().defaultNow(),
  },
  (table) => [
    unique('pads_company_id_id_key').on(table.companyId, table.id),
    foreignKey({
      name: 'pads_technician_fkey',
      columns: [table.companyId, table.technicianId],
      foreignColumns: [users.companyId, users.id],
    }),
    index('pads_technician_index').on(table.technicianId),
    ...commissionedByManagers('pads', staffOr(sql`id in (select o.pad_id from pad_ownerships o)`)),
    machineWorks('pads'),
  ],
);
