import { bigint, index, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { companyId, instant } from './columns.ts';
import { appReads, machineWorks, managersOnly } from './policies.ts';

/** What was refused from a device and why; the last few of each device are kept. */
export const refusedMessages = pgTable(
  'refused_messages',
  {
    id: bigint({ mode: 'number' }).generatedAlwaysAsIdentity().primaryKey(),
    companyId: companyId(),
    deviceId: uuid('device_id').notNull(),
    receivedAt: instant('received_at').notNull(),
    reason: text().notNull(),
    detail: text().notNull(),
    /** The beginning of what came. */
    sample: text().notNull(),
  },
  (table) => [
    index('refused_messages_device_index').on(table.deviceId, table.id),
    appReads('refused_messages', managersOnly),
    machineWorks('refused_messages'),
  ],
);
