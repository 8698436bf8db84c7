import { foreignKey, index, pgTable, primaryKey, uuid } from 'drizzle-orm/pg-core';
import { alarms } from './alarms.ts';
import { companyId, instant } from './columns.ts';
import { appReads, machineWorks, staffOnly } from './policies.ts';
import { pumps } from './pumps.ts';

/** The pumps that an alarm without a pump of its own speaks for. */
export const alarmMembers = pgTable(
  'alarm_members',
  {
    companyId: companyId(),
    alarmId: uuid('alarm_id').notNull(),
    pumpId: uuid('pump_id').notNull(),
    joinedAt: instant('joined_at').notNull(),
    /** When its own condition was over; null while it stands. */
    leftAt: instant('left_at'),
  },
  (table) => [
    primaryKey({ name: 'alarm_members_pkey', columns: [table.alarmId, table.pumpId] }),
    foreignKey({
      name: 'alarm_members_alarm_fkey',
      columns: [table.companyId, table.alarmId],
      foreignColumns: [alarms.companyId, alarms.id],
    }),
    foreignKey({
      name: 'alarm_members_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }),
    index('alarm_members_pump_index').on(table.pumpId),
    appReads('alarm_members', staffOnly),
    machineWorks('alarm_members'),
  ],
);
