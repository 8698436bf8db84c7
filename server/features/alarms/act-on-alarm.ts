import type { Context } from '#server/context.ts';
import { conflict } from '#server/errors.ts';
import { type ExpectedVersion, requireVersion } from '#server/http/etag.ts';
import type { AlarmAct } from '#shared/contract/http/alarm-acts.ts';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { isOpen } from '#shared/domain/alarms/alarm-record.ts';
import { requireMayAct } from './alarm-policy.ts';
import { getAlarmForUpdate, isOpenAgain, saveStep } from './alarm-repository.ts';
import { getAlarm } from './read-alarm.ts';
import { takeAct } from './take-act.ts';
import { getTechnician } from './technicians-read-model.ts';

export type ActInput = { readonly alarmId: string; readonly act: AlarmAct; readonly ifMatch: ExpectedVersion };

/** Does one thing to an alarm, with its transition and its line in the audit trail. Repeating it changes nothing. */
export async function actOnAlarm(context: Context, { alarmId, act, ifMatch }: ActInput): Promise<Alarm> {
  const { actor, now } = context;
  requireMayAct(actor, act.kind);
  const alarm = await getAlarmForUpdate(context, alarmId);
  requireVersion(ifMatch, alarm.version);
  const name = act.kind === 'assign' ? (await getTechnician(context, act.technicianId)).name : '';
  const outcome = takeAct(alarm.record, { by: actor.userId, at: now, name }, act);
  if ('refusal' in outcome) throw conflict(outcome.refusal);
  const comesBack = !isOpen(alarm.record) && isOpen(outcome.step.record);
  if (comesBack && (await isOpenAgain(context, alarm)))
    throw conflict('It was raised anew meanwhile: see the open alarm of this pump.');
  await saveStep(context, alarm, outcome.step);
  return getAlarm(context, alarmId);
}
