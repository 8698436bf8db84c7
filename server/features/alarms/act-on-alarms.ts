import type { Context } from '#server/context.ts';
import { RequestError } from '#server/errors.ts';
import type { ActOnAlarms, AlarmActsDone } from '#shared/contract/http/alarm-acts.ts';
import { actOnAlarm } from './act-on-alarm.ts';

/**
 * Does something to each of several alarms, in the order of their ids so that two people at once never wait for one
 * another in a circle. One that is refused is named with its reason; the others are done.
 */
export async function actOnAlarms(context: Context, { acts }: ActOnAlarms): Promise<AlarmActsDone> {
  const done: AlarmActsDone['done'] = [];
  const refused: AlarmActsDone['refused'] = [];
  for (const { alarmId, version, act } of acts.toSorted((a, b) => (a.alarmId < b.alarmId ? -1 : 1))) {
    try {
      done.push(await actOnAlarm(context, { alarmId, act, ifMatch: version }));
    } catch (error) {
      if (!(error instanceof RequestError)) throw error;
      refused.push({ alarmId, code: error.code, detail: error.message });
    }
  }
  return { done, refused };
}
