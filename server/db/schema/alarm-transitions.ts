import { sql } from 'drizzle-orm';
import { foreignKey, index, jsonb, pgPolicy, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import type { Evidence, Priority } from '#shared/domain/detectors/detector.ts';
import { alarms } from './alarms.ts';
import { companyId, id, instant } from './columns.ts';
import { appReads, machineWorks, millraceApp, staffOnly, staffOr } from './policies.ts';

/** Every change of an alarm's state, with who, when and the evidence; never changed afterwards. */
export const alarmTransitions = pgTable(
  'alarm_transitions',
  {
    id: id(),
    companyId: companyId(),
    alarmId: uuid('alarm_id').notNull(),
    at: instant('at').notNull(),
    kind: text().notNull(),
    byUserId: uuid('by_user_id'),
    /** The name as it was then. */
    byName: text('by_name'),
    note: text(),
    priority: text().$type<Priority>().notNull(),
    cause: text().notNull(),
    evidence: jsonb().$type<Evidence>().notNull().default({}),
  },
  (table) => [
    foreignKey({
      name: 'alarm_transitions_alarm_fkey',
      columns: [table.companyId, table.alarmId],
      foreignColumns: [alarms.companyId, alarms.id],
    }),
    index('alarm_transitions_alarm_index').on(table.alarmId, table.at),
    // Always read for one alarm, so a look at that alarm is cheaper than a list of all of them.
    appReads('alarm_transitions', staffOr(sql`exists (select from alarms a where a.id = alarm_id)`)),
    pgPolicy('alarm_transitions_app_inserts', { for: 'insert', to: millraceApp, withCheck: staffOnly }),
    machineWorks('alarm_transitions'),
  ],
);
