import { sql } from 'drizzle-orm';
import {
  boolean,
  check,
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
import type { AlarmClass, Detector, Evidence, Priority } from '#shared/domain/detectors/detector.ts';
import type { AreaKind } from '#shared/domain/fold/area/area-signal.ts';
import { companyId, id, instant, xid8 } from './columns.ts';
import { pads } from './pads.ts';
import { appReads, machineWorks, millraceApp, ofVisiblePumpSince, staffOnly } from './policies.ts';
import { pumps } from './pumps.ts';
import { users } from './users.ts';

export type AlarmState = 'unacknowledged' | 'acknowledged' | 'returned' | 'latched' | 'normal';

/**
 * What a detector raised (ISA-18.2). At most one open a pump and detector; `normal` = returned and acknowledged: history.
 * An alarm that speaks for several pumps has no pump of its own, but the key that the area fold gave it.
 */
export const alarms = pgTable(
  'alarms',
  {
    id: id(),
    companyId: companyId(),
    pumpId: uuid('pump_id'),
    padId: uuid('pad_id'),
    groupKey: text('group_key'),
    groupKind: text('group_kind').$type<AreaKind>(),
    groupArea: text('group_area'),
    /** The alarm that speaks for this one. */
    coveredBy: uuid('covered_by'),
    detector: text().$type<Detector>().notNull(),
    alarmClass: text('alarm_class').$type<AlarmClass>().notNull(),
    priority: text().$type<Priority>().notNull(),
    state: text().$type<AlarmState>().notNull(),
    cause: text().notNull(),
    evidence: jsonb().$type<Evidence>().notNull(),
    /** When the condition began. */
    fromAt: instant('from_at').notNull(),
    /** When the rule spoke. */
    raisedAt: instant('raised_at').notNull(),
    returnedAt: instant('returned_at'),
    acknowledgedAt: instant('acknowledged_at'),
    acknowledgedBy: uuid('acknowledged_by'),
    acknowledgementNote: text('acknowledgement_note'),
    escalatedAt: instant('escalated_at'),
    shelvedUntil: instant('shelved_until'),
    shelvedBy: uuid('shelved_by'),
    shelvedReason: text('shelved_reason'),
    suppressed: boolean().notNull().default(false),
    outOfService: boolean('out_of_service').notNull().default(false),
    latched: boolean().notNull().default(false),
    /** Who was given it instead of the pad's technician. */
    assignedTo: uuid('assigned_to'),
    /** When a note was worked off, and the cause it was found to have, where it is one that is weighed. */
    doneAt: instant('done_at'),
    doneCause: text('done_cause'),
    count: integer().notNull().default(1),
    /** The state machine's own record, opaque here. */
    record: jsonb().$type<unknown>().notNull(),
    /** Grows with every change: the base of its ETag. */
    version: integer().notNull().default(1),
    changedIn: xid8('changed_in').notNull().default(sql`pg_current_xact_id()`),
  },
  (table) => [
    foreignKey({
      name: 'alarms_pump_fkey',
      columns: [table.companyId, table.pumpId],
      foreignColumns: [pumps.companyId, pumps.id],
    }),
    foreignKey({
      name: 'alarms_pad_fkey',
      columns: [table.companyId, table.padId],
      foreignColumns: [pads.companyId, pads.id],
    }),
    foreignKey({
      name: 'alarms_acknowledged_by_fkey',
      columns: [table.companyId, table.acknowledgedBy],
      foreignColumns: [users.companyId, users.id],
    }),
    foreignKey({
      name: 'alarms_shelved_by_fkey',
      columns: [table.companyId, table.shelvedBy],
      foreignColumns: [users.companyId, users.id],
    }),
    foreignKey({
      name: 'alarms_assigned_to_fkey',
      columns: [table.companyId, table.assignedTo],
      foreignColumns: [users.companyId, users.id],
    }),
    foreignKey({
      name: 'alarms_covered_by_fkey',
      columns: [table.companyId, table.coveredBy],
      foreignColumns: [table.companyId, table.id],
    }),
    check(
      'alarms_pump_or_group',
      sql`(pump_id is null) = (group_key is not null) and (pump_id is null) = (pad_id is null) and (pump_id is null) = (group_kind is not null)`,
    ),
    unique('alarms_company_id_id_key').on(table.companyId, table.id),
    unique('alarms_pump_detector_from_key').on(table.pumpId, table.detector, table.fromAt),
    uniqueIndex('alarms_open_key').on(table.pumpId, table.detector).where(sql`state <> 'normal'`),
    uniqueIndex('alarms_open_group_key').on(table.companyId, table.groupKey).where(sql`state <> 'normal'`),
    index('alarms_covered_index').on(table.coveredBy).where(sql`covered_by is not null`),
    index('alarms_uncured_index').on(table.doneAt).where(sql`done_at is not null and returned_at is null`),
    index('alarms_found_index').on(table.companyId, table.detector).where(sql`done_cause is not null`),
    index('alarms_open_index').on(table.companyId, table.priority).where(sql`state <> 'normal'`),
    index('alarms_raised_index').on(table.companyId, table.raisedAt),
    index('alarms_changed_index').on(table.companyId, table.changedIn),
    appReads('alarms', ofVisiblePumpSince('from_at')),
    pgPolicy('alarms_app_updates', { for: 'update', to: millraceApp, using: staffOnly, withCheck: staffOnly }),
    machineWorks('alarms'),
  ],
);
