import type pg from 'pg';
import { UNTRUE } from './untrue-mail.ts';

type Database = Pick<pg.ClientBase, 'query'>;

/** A mail as it is put into the outbox, its content frozen. */
export type OutboxMail = {
  readonly id: string;
  readonly companyId: string;
  readonly alarmId: string;
  readonly transition: string;
  readonly recipientUserId: string;
  readonly address: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  readonly messageId: string;
  /** When it leaves, ms. */
  readonly dueAt: number;
};

/** Puts mails into the outbox; one that is there already (the same change to the same address) stays as it is. */
export async function enqueueMails(database: Database, mails: readonly OutboxMail[]): Promise<void> {
  const rows = mails.map((mail) => ({
    id: mail.id,
    company_id: mail.companyId,
    alarm_id: mail.alarmId,
    transition: mail.transition,
    recipient_user_id: mail.recipientUserId,
    to_address: mail.address,
    subject: mail.subject,
    text: mail.text,
    html: mail.html,
    message_id: mail.messageId,
    due_at: mail.dueAt,
  }));
  await database.query(
    `insert into outbox_mails (id, company_id, alarm_id, transition, recipient_user_id, to_address, subject, text, html,
       message_id, due_at)
     select g.id, g.company_id, g.alarm_id, g.transition, g.recipient_user_id, g.to_address, g.subject, g.text, g.html,
       g.message_id, to_timestamp(g.due_at / 1000)
     from json_to_recordset($1::json) as g(id uuid, company_id uuid, alarm_id uuid, transition text,
       recipient_user_id uuid, to_address text, subject text, text text, html text, message_id text, due_at float8)
     on conflict do nothing`,
    [JSON.stringify(rows)],
  );
}

/** A mail that was taken back before it left. */
export type WithdrawnMail = {
  readonly alarmId: string;
  readonly companyId: string;
  readonly padId: string;
  readonly recipientUserId: string;
  readonly dueAt: number;
  /** A mail of this alarm had come due: it called somebody, if only on the screens. */
  readonly isHeard: boolean;
  /** Other alarms leave with it, at the same instant. */
  readonly isShared: boolean;
};

type WithdrawnRow = {
  readonly alarm_id: string;
  readonly company_id: string;
  readonly pad_id: string;
  readonly recipient_user_id: string;
  readonly due_at: number;
  readonly is_heard: boolean;
  readonly is_shared: boolean;
};

/** In a sender's hands: it may have left already. */
const LEAVING = 'm.leased_until > to_timestamp($2::float8 / 1000)';

/** Every mail of some alarms; or some mails, as far as they are untrue. */
export type Withdrawal = { readonly alarmIds: readonly string[] } | { readonly mailIds: readonly string[] };

/** Takes back what has not left, also what waits for another try. */
export async function withdrawMails(database: Database, withdrawal: Withdrawal, now: number): Promise<WithdrawnMail[]> {
  const [ids, which] =
    'alarmIds' in withdrawal
      ? [withdrawal.alarmIds, 'm.alarm_id = any($1::uuid[])']
      : [withdrawal.mailIds, `m.id = any($1::uuid[]) and ${UNTRUE}`];
  const { rows } = await database.query<WithdrawnRow>(
    `with withdrawn as (
       delete from outbox_mails m
       where ${which} and m.sent_at is null and m.failed_at is null and (${LEAVING}) is not true
       returning id, alarm_id, company_id, recipient_user_id, due_at)
     select w.alarm_id, w.company_id, coalesce(a.pad_id, a.id) as pad_id, w.recipient_user_id, date_part('epoch', w.due_at) * 1000 as due_at,
       exists (select from outbox_mails m where m.alarm_id = w.alarm_id
         and (m.attempts > 0 or m.due_at <= to_timestamp($2::float8 / 1000))) as is_heard,
       exists (select from outbox_mails m where m.recipient_user_id = w.recipient_user_id and m.due_at = w.due_at
         and m.id not in (select id from withdrawn)) as is_shared
     from withdrawn w join alarms a on a.id = w.alarm_id`,
    [ids, now],
  );
  return rows.map((row) => ({
    alarmId: row.alarm_id,
    companyId: row.company_id,
    padId: row.pad_id,
    recipientUserId: row.recipient_user_id,
    dueAt: Math.round(row.due_at),
    isHeard: row.is_heard,
    isShared: row.is_shared,
  }));
}

/** Mails that have not left and no longer tell the truth. */
export async function listUntrueMails(database: Database): Promise<string[]> {
  const { rows } = await database.query<{ id: string }>(
    `select m.id from outbox_mails m where m.sent_at is null and m.failed_at is null and ${UNTRUE}`,
  );
  return rows.map(({ id }) => id);
}
