import { sql } from 'drizzle-orm';
import { foreignKey, index, integer, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core';
import { alarms } from './alarms.ts';
import { companyId, id, instant } from './columns.ts';
import { appReads, machineWorks, staffOnly } from './policies.ts';

/** Mail to be sent, its content frozen when it was decided; a transition mails an address once. */
export const outboxMails = pgTable(
  'outbox_mails',
  {
    id: id(),
    companyId: companyId(),
    alarmId: uuid('alarm_id'),
    /** Which change of the alarm this mail tells of. */
    transition: text().notNull(),
    recipientUserId: uuid('recipient_user_id'),
    toAddress: text('to_address').notNull(),
    subject: text().notNull(),
    text: text().notNull(),
    html: text().notNull(),
    messageId: text('message_id').notNull(),
    createdAt: instant('created_at').notNull().defaultNow(),
    dueAt: instant('due_at').notNull(),
    attempts: integer().notNull().default(0),
    /** In a sender's hands until then. */
    leasedUntil: instant('leased_until'),
    /** After a failed attempt: when the next one may be made. */
    retryAt: instant('retry_at'),
    sentAt: instant('sent_at'),
    /** Given up: no further attempt is made. */
    failedAt: instant('failed_at'),
    lastError: text('last_error'),
  },
  (table) => [
    unique('outbox_mails_message_id_key').on(table.messageId),
    unique('outbox_mails_once_key').on(table.alarmId, table.transition, table.toAddress),
    foreignKey({
      name: 'outbox_mails_alarm_fkey',
      columns: [table.companyId, table.alarmId],
      foreignColumns: [alarms.companyId, alarms.id],
    }),
    index('outbox_mails_due_index').on(table.dueAt).where(sql`sent_at is null and failed_at is null`),
    appReads('outbox_mails', staffOnly),
    machineWorks('outbox_mails'),
  ],
);
