import type pg from 'pg';

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

/** Withdraws what was not due yet of alarms that need nobody any more; answers the alarms of which nothing had left. */
export async function withdrawMails(
  database: Database,
  alarmIds: readonly string[],
  now: number,
): Promise<Set<string>> {
  const { rows } = await database.query<{ alarm_id: string }>(
    `with withdrawn as (
       delete from outbox_mails where alarm_id = any($1::uuid[]) and attempts = 0 and due_at > to_timestamp($2::float8 / 1000)
       returning alarm_id)
     select distinct w.alarm_id from withdrawn w where not exists (
       select from outbox_mails m where m.alarm_id = w.alarm_id
         and (m.attempts > 0 or m.due_at <= to_timestamp($2::float8 / 1000)))`,
    [alarmIds, now],
  );
  return new Set(rows.map(({ alarm_id }) => alarm_id));
}
