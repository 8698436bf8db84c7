import type { Context } from '#server/context.ts';
import { type ExpectedVersion, requireVersion } from '#server/http/etag.ts';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { acknowledge } from '#shared/domain/alarms/acknowledge.ts';
import { getAlarmForUpdate, saveStep } from './alarm-repository.ts';
import { getAlarm } from './read-alarm.ts';

/** Marks an alarm as seen by whoever asks. Repeating it changes nothing; it never clears the condition. */
export async function acknowledgeAlarm(
  context: Context,
  input: { readonly alarmId: string; readonly note?: string | undefined; readonly ifMatch: ExpectedVersion },
): Promise<Alarm> {
  const alarm = await getAlarmForUpdate(context, input.alarmId);
  requireVersion(input.ifMatch, alarm.version);
  const note = input.note === undefined || input.note === '' ? null : input.note;
  await saveStep(context, alarm, acknowledge(alarm.record, { by: context.actor.userId, at: context.now, note }));
  return getAlarm(context, input.alarmId);
}
