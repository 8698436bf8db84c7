import type pg from 'pg';
import { UNTRUE } from './untrue-mail.ts';

type Database = Pick<pg.Pool, 'query'>;

/** A mail of the outbox that is ours to send until its lease ends. */
export type ClaimedMail = {
  readonly id: string;
  readonly address: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  readonly messageId: string;
  /** Mails to one address with the same instant leave as one. */
  readonly dueAt: number;
  /** With this one. */
  readonly attempts: number;
};

/** Long enough for one attempt with all its time limits. */
export const LEASE_SECONDS = 60;
const GROUPS_A_CLAIM = 20;

/** Due, in nobody's hands, not waiting for another try, and still true: what is not is taken back by a job. */
const IS_DUE = `m.sent_at is null and m.failed_at is null and m.due_at <= $1
  and (m.leased_until is null or m.leased_until <= $1) and (m.retry_at is null or m.retry_at <= $1) and not ${UNTRUE}`;

/**
 * Takes what is due, whole groups at a time; what another worker holds is passed over. A worker that dies lets its
 * lease run out, and the mail is sent again under the same Message-ID.
 */
export async function claimMails(database: Database, now: number): Promise<ClaimedMail[]> {
  const { rows } = await database.query<Omit<ClaimedMail, 'dueAt'> & { readonly due_at: number }>(
    `with due as (
       select distinct to_address, due_at from outbox_mails m where ${IS_DUE} order by due_at limit $2),
     locked as (
       select m.id from outbox_mails m join due using (to_address, due_at)
       where ${IS_DUE} order by m.id for update of m skip locked)
     update outbox_mails m set leased_until = $1::timestamptz + make_interval(secs => $3), attempts = m.attempts + 1
     from locked where m.id = locked.id
     returning m.id, m.to_address as address, m.subject, m.text, m.html, m.message_id as "messageId",
       date_part('epoch', m.due_at) * 1000 as due_at, m.attempts`,
    [new Date(now), GROUPS_A_CLAIM, LEASE_SECONDS],
  );
  return rows.map(({ due_at, ...mail }) => ({ ...mail, dueAt: Math.round(due_at) }));
}

/** Notes that the mail server took these. */
export async function markSent(database: Database, ids: readonly string[], now: number): Promise<void> {
  await database.query(
    'update outbox_mails set sent_at = $2, leased_until = null, last_error = null where id = any($1::uuid[])',
    [ids, new Date(now)],
  );
}

/** Notes a failed attempt; the next one is made at `retryAt` (ms). */
export async function markDelayed(
  database: Database,
  ids: readonly string[],
  error: string,
  retryAt: number,
): Promise<void> {
  await database.query(
    'update outbox_mails set leased_until = null, retry_at = $2, last_error = $3 where id = any($1::uuid[])',
    [ids, new Date(retryAt), error],
  );
}

/** Gives mails up: the mail server will never take them. */
export async function markFailed(
  database: Database,
  ids: readonly string[],
  error: string,
  now: number,
): Promise<void> {
  await database.query(
    'update outbox_mails set failed_at = $2, leased_until = null, last_error = $3 where id = any($1::uuid[])',
    [ids, new Date(now), error],
  );
}
