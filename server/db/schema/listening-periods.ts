import { index, pgTable } from 'drizzle-orm/pg-core';
import { id, instant } from './columns.ts';
import { machineWorks } from './policies.ts';

/** When the server was listening: silence counts only then. */
export const listeningPeriods = pgTable(
  'listening_periods',
  {
    id: id(),
    startedAt: instant('started_at').notNull(),
    aliveAt: instant('alive_at').notNull(),
  },
  (table) => [index('listening_periods_alive_index').on(table.aliveAt), machineWorks('listening_periods')],
);
