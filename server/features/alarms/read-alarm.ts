import type { Context } from '#server/context.ts';
import { notFound } from '#server/errors.ts';
import type { Alarm, AlarmDetail } from '#shared/contract/http/alarms.ts';
import { explainAlarm } from '#shared/domain/causes/explain-alarm.ts';
import { countFoundCauses, findAlarmRow, listMails, listTransitions } from './alarm-detail-read-model.ts';
import { listMembers } from './alarm-members-read-model.ts';
import { presentAlarm } from './present-alarm.ts';
import { presentLikely } from './present-likely.ts';

/** One alarm as the person may read it. */
export async function getAlarm({ db, actor, now }: Context, alarmId: string): Promise<Alarm> {
  const row = await findAlarmRow(db, alarmId);
  if (row === undefined) throw notFound('alarm');
  return presentAlarm(row, actor, now);
}

/** One alarm with its life and the mails that told of it; a homeowner reads neither names nor notes of staff. */
export async function readAlarm(context: Context, alarmId: string): Promise<AlarmDetail> {
  const alarm = await getAlarm(context, alarmId);
  const transitions = await listTransitions(context.db, alarmId);
  const mails = await listMails(context.db, alarmId);
  const isStaff = context.actor.role !== 'homeowner';
  return {
    ...alarm,
    // The causes that are weighed are those of one pump.
    likely:
      isStaff && alarm.group === null
        ? presentLikely(explainAlarm(alarm, alarm.zone, await countFoundCauses(context.db, alarmId)))
        : null,
    members: alarm.group === null ? [] : await listMembers(context.db, alarmId),
    transitions: isStaff ? transitions : transitions.map((transition) => ({ ...transition, by: null, note: null })),
    mails,
    serverNow: context.now,
  };
}
