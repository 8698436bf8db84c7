import { sql } from 'drizzle-orm';
import { index, jsonb, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { companyId, instant, sequenceNumber } from './columns.ts';
import { appReads, machineWorks, staffOnly } from './policies.ts';

/** Every status and settings message, kept for good: evidence of silence, skew and power cuts is replayed from here. */
export const deviceEvents = pgTable(
  'device_events',
  {
    /** Order of arrival, in one row of numbers with readings. */
    sequence: sequenceNumber('sequence').notNull().default(sql`nextval('arrival_sequence')`),
    companyId: companyId(),
    deviceId: uuid('device_id').notNull(),
    pumpId: uuid('pump_id'),
    kind: text().$type<'status' | 'settings'>().notNull(),
    receivedAt: instant('received_at').notNull(),
    /** The decoded message. */
    body: jsonb().$type<Record<string, unknown>>().notNull(),
  },
  (table) => [
    primaryKey({ name: 'device_events_pkey', columns: [table.sequence] }),
    index('device_events_pump_index').on(table.pumpId, table.sequence),
    index('device_events_device_index').on(table.deviceId, table.receivedAt),
    appReads('device_events', staffOnly),
    machineWorks('device_events'),
  ],
);
