import { sql } from 'drizzle-orm';
import { check, foreignKey, index, pgTable, uuid } from 'drizzle-orm/pg-core';
import { companyId, id, instant } from './columns.ts';
import { customers } from './customers.ts';
import { pads } from './pads.ts';
import { commissionedByManagers, machineWorks, staffOr } from './policies.ts';

/**
 * Whose pad it was, half-open in time; one owner at a time (an exclusion constraint). Every rule that lets a
 * homeowner see something rests on this table's own: of ownerships they see those that hold now, no other.
 */
export const padOwnerships = pgTable(
  'pad_ownerships',
  {
    id: id(),
    companyId: companyId(),
    padId: uuid('pad_id').notNull(),
    customerId: uuid('customer_id').notNull(),
    startsAt: instant('starts_at').notNull(),
    endsAt: instant('ends_at'),
  },
  (table) => [
    foreignKey({
      name: 'pad_ownerships_pad_fkey',
      columns: [table.companyId, table.padId],
      foreignColumns: [pads.companyId, pads.id],
    }),
    foreignKey({
      name: 'pad_ownerships_customer_fkey',
      columns: [table.companyId, table.customerId],
      foreignColumns: [customers.companyId, customers.id],
    }),
    index('pad_ownerships_customer_index').on(table.customerId),
    check('pad_ownerships_order', sql`ends_at is null or ends_at > starts_at`),
    ...commissionedByManagers(
      'pad_ownerships',
      staffOr(
        sql`customer_id = (select millrace_customer()) and starts_at <= now() and (ends_at is null or ends_at > now())`,
      ),
    ),
    machineWorks('pad_ownerships'),
  ],
);
