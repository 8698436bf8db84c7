import { type SQL, sql } from 'drizzle-orm';
import type { Transaction } from '#server/db/transaction.ts';
import type { AlarmDetail } from '#shared/contract/http/alarms.ts';
import { alarmColumns, alarmFrom } from './alarm-columns-read-model.ts';
import type { AlarmRow } from './alarm-row.ts';

/** One alarm, if the person may see it. */
export async function findAlarmRow(db: Transaction, alarmId: string): Promise<AlarmRow | undefined> {
  return (await selectAlarms(db, sql`a.id = ${alarmId}`, 1))[0];
}

/** Alarms changed by a transaction that an earlier snapshot had not seen, at most `limit`. */
export const listAlarmRowsChangedSince = (db: Transaction, cursor: string, limit: number): Promise<AlarmRow[]> =>
  selectAlarms(db, sql`a.changed_in >= ${cursor}::xid8`, limit);

async function selectAlarms(db: Transaction, condition: SQL, limit: number): Promise<AlarmRow[]> {
  const { rows } = await db.execute<AlarmRow>(
    sql`select ${alarmColumns} from ${alarmFrom} where ${condition} limit ${limit}`,
  );
  return rows;
}

/** Every change of an alarm, oldest first. */
export async function listTransitions(db: Transaction, alarmId: string): Promise<AlarmDetail['transitions']> {
  const { rows } = await db.execute<AlarmDetail['transitions'][number]>(sql`
    select (extract(epoch from t.at) * 1000)::float8 as at, t.kind, coalesce(t.by_name, u.name) as by, t.note, t.priority,
      t.cause, t.evidence
    from alarm_transitions t left join users u on u.id = t.by_user_id
    where t.alarm_id = ${alarmId} order by t.at, t.id`);
  return rows;
}

/** Mails that told of an alarm, oldest first. */
export async function listMails(db: Transaction, alarmId: string): Promise<AlarmDetail['mails']> {
  const { rows } = await db.execute<AlarmDetail['mails'][number]>(sql`
    select to_address as "to", subject, (extract(epoch from created_at) * 1000)::float8 as "queuedAt",
      (extract(epoch from sent_at) * 1000)::float8 as "sentAt", attempts
    from outbox_mails where alarm_id = ${alarmId} order by created_at, id`);
  return rows.map((row) => ({
    ...row,
    queuedAt: Math.round(row.queuedAt),
    sentAt: row.sentAt === null ? null : Math.round(row.sentAt),
  }));
}

/** How often each cause was found where a case of this detector was worked off, in the person's company. */
export async function countFoundCauses(db: Transaction, alarmId: string): Promise<Readonly<Record<string, number>>> {
  const { rows } = await db.execute<{ cause: string; times: number }>(sql`
    select f.done_cause as cause, count(*)::int as times from alarms f
    join alarms a on a.company_id = f.company_id and a.detector = f.detector and a.id = ${alarmId}
    where f.done_cause is not null group by f.done_cause`);
  return Object.fromEntries(rows.map(({ cause, times }) => [cause, times]));
}
