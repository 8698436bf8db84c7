import { foreignKey, index, pgPolicy, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { companyId, id, instant } from './columns.ts';
import { machineWorks, millraceApp, staffOnly } from './policies.ts';
import { pumps } from './pumps.ts';

/** What has to be worked out again: days whose runs late readings corrected, or the price of what is there. */
export type MarkKind = 'days' | 'prices';

/** A stretch of a pump's past that the rollups have yet to follow; taken away with the work it asked for. */
export const rollupMarks = pgTable(
  'rollup_marks',
  {
    id: id(),
    companyId: companyId(),
    pumpId: uuid('pump_id').notNull(),
    kind: text().$type<MarkKind>().notNull(),
    fromAt: instant('from_at').notNull(),
    toAt: instant('to_at').notNull(),
  },
  (table) => [
    foreignKey({
      name: 'rollup_marks_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }),
    index('rollup_marks_pump_index').on(table.companyId, table.pumpId),
    pgPolicy('rollup_marks_app_reads', { for: 'select', to: millraceApp, using: staffOnly }),
    pgPolicy('rollup_marks_app_inserts', { for: 'insert', to: millraceApp, withCheck: staffOnly }),
    machineWorks('rollup_marks'),
  ],
);
