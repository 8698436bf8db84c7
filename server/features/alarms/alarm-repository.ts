import { and, eq, ne, sql } from 'drizzle-orm';
import type { Context } from '#server/context.ts';
import { newId } from '#server/db/new-id.ts';
import { recordAct } from '#server/db/record-act.ts';
import { alarmTransitions } from '#server/db/schema/alarm-transitions.ts';
import { alarms } from '#server/db/schema/alarms.ts';
import { notFound } from '#server/errors.ts';
import type { AlarmRecord, AlarmStep } from '#shared/domain/alarms/alarm-record.ts';
import { readRecord } from '#shared/domain/alarms/read-record.ts';

export type LockedAlarm = {
  readonly id: string;
  /** null = it speaks for several pumps. */
  readonly pumpId: string | null;
  readonly record: AlarmRecord;
  readonly version: number;
};

/** An alarm of the person's company, locked until the end of the transaction: the fold waits, or we do. */
export async function getAlarmForUpdate({ db, actor }: Context, alarmId: string): Promise<LockedAlarm> {
  const [row] = await db
    .select({ id: alarms.id, pumpId: alarms.pumpId, record: alarms.record, version: alarms.version })
    .from(alarms)
    .where(and(eq(alarms.companyId, actor.companyId), eq(alarms.id, alarmId)))
    .for('update');
  if (row === undefined) throw notFound('alarm');
  return { ...row, record: readRecord(row.record) };
}

const toDate = (at: number | null): Date | null => (at === null ? null : new Date(at));

/** Stores what a person did to an alarm, with its transition, and rings for the open screens. */
export async function saveStep(context: Context, alarm: LockedAlarm, { record, transition }: AlarmStep): Promise<void> {
  if (transition === undefined) return;
  const { db, actor } = context;
  await db
    .update(alarms)
    .set({
      state: record.state,
      latched: record.state === 'latched',
      acknowledgedAt: toDate(record.acknowledgedAt),
      acknowledgedBy: record.acknowledgedBy,
      acknowledgementNote: record.acknowledgementNote,
      escalatedAt: toDate(record.escalatedAt),
      shelvedUntil: toDate(record.shelf?.until ?? null),
      shelvedBy: record.shelf?.by ?? null,
      shelvedReason: record.shelf?.reason ?? null,
      suppressed: record.suppressedBy !== null,
      outOfService: record.outOfService !== null,
      assignedTo: record.assignment?.to ?? null,
      doneAt: toDate(record.done?.at ?? null),
      doneCause: record.done?.cause ?? null,
      record,
      version: alarm.version + 1,
    })
    .where(and(eq(alarms.companyId, actor.companyId), eq(alarms.id, alarm.id)));
  await db.insert(alarmTransitions).values({
    id: newId(),
    companyId: actor.companyId,
    alarmId: alarm.id,
    at: new Date(transition.at),
    kind: transition.kind,
    byUserId: transition.by,
    byName: actor.name,
    note: transition.note,
    priority: transition.priority,
    cause: transition.cause,
    evidence: transition.evidence,
  });
  await recordAct(context, { action: `alarm.${transition.kind}`, subjectKind: 'alarm', subjectId: alarm.id });
  await db.execute(sql`select pg_notify('millrace_live', ${alarm.pumpId ?? ''})`);
}

/** Whether another alarm of the same pump and detector is open: two at once cannot be. */
export async function isOpenAgain({ db, actor }: Context, alarm: LockedAlarm): Promise<boolean> {
  const { detector } = alarm.record;
  // Every alarm that speaks for several pumps has a key of its own.
  if (alarm.pumpId === null) return false;
  const sameKey = and(
    eq(alarms.companyId, actor.companyId),
    eq(alarms.pumpId, alarm.pumpId),
    eq(alarms.detector, detector),
  );
  return (await db.$count(alarms, and(sameKey, ne(alarms.id, alarm.id), ne(alarms.state, 'normal')))) > 0;
}
