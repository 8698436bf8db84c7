import { sql } from 'drizzle-orm';
import {
  foreignKey,
  index,
  integer,
  jsonb,
  pgPolicy,
  pgTable,
  text,
  unique,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { companyId, id, instant } from './columns.ts';
import { companies } from './companies.ts';
import { appReads, machineWorks, managersOnly, millraceApp } from './policies.ts';
import { users } from './users.ts';

export type BacktestState = 'waiting' | 'running' | 'done' | 'failed' | 'cancelled';

/** A change of rules tried on what is stored: asked for by a manager, folded by the worker. One at a time a company. */
export const backtests = pgTable(
  'backtests',
  {
    id: id(),
    companyId: companyId().references(() => companies.id),
    askedBy: uuid('asked_by'),
    askedAt: instant('asked_at').notNull(),
    state: text().$type<BacktestState>().notNull(),
    /** Scope, proposed rules and time range, opaque here. */
    request: jsonb().$type<unknown>().notNull(),
    pumpCount: integer('pump_count').notNull(),
    pumpsDone: integer('pumps_done').notNull().default(0),
    readings: integer().notNull().default(0),
    /** How far into the pump that is folded now, 0 to 1000. */
    permilleOfPump: integer('permille_of_pump').notNull().default(0),
    cancelAskedAt: instant('cancel_asked_at'),
    startedAt: instant('started_at'),
    /** When a worker last said that it works on it: another takes over what nobody works on. */
    workedAt: instant('worked_at'),
    endedAt: instant('ended_at'),
    failure: text(),
  },
  (table) => [
    foreignKey({
      name: 'backtests_asked_by_fkey',
      columns: [table.companyId, table.askedBy],
      foreignColumns: [users.companyId, users.id],
    }),
    unique('backtests_company_id_id_key').on(table.companyId, table.id),
    uniqueIndex('backtests_one_at_a_time_key').on(table.companyId).where(sql`state in ('waiting', 'running')`),
    index('backtests_asked_index').on(table.companyId, table.askedAt),
    appReads('backtests', managersOnly),
    pgPolicy('backtests_app_inserts', { for: 'insert', to: millraceApp, withCheck: managersOnly }),
    pgPolicy('backtests_app_updates', { for: 'update', to: millraceApp, using: managersOnly, withCheck: managersOnly }),
    machineWorks('backtests'),
  ],
);
