import type { Context } from '#server/context.ts';
import { conflict } from '#server/errors.ts';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { withdrawAcknowledgement as withdraw } from '#shared/domain/alarms/acknowledge.ts';
import { getAlarmForUpdate, isOpenAgain, saveStep } from './alarm-repository.ts';
import { getAlarm } from './read-alarm.ts';

/** Takes back one's own acknowledgement within five minutes. One that was raised anew meanwhile stays history. */
export async function withdrawAcknowledgement(context: Context, alarmId: string): Promise<Alarm> {
  const alarm = await getAlarmForUpdate(context, alarmId);
  const step = withdraw(alarm.record, { by: context.actor.userId, at: context.now });
  if (step === undefined) {
    throw conflict('Only your own acknowledgement can be taken back, and only within five minutes.');
  }
  if (await isOpenAgain(context, alarm))
    throw conflict('It was raised anew meanwhile: see the open alarm of this pump.');
  await saveStep(context, alarm, step);
  return getAlarm(context, alarmId);
}
