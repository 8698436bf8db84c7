import type pg from 'pg';
import { asMachine } from '#server/db/transaction.ts';
import type { AlarmChange, OpenAlarm } from '#server/fold/alarm-change.ts';
import { listWaitingAlarms, lockAlarms, saveAlarmChanges } from '#server/fold/alarms-repository.ts';
import { ring, ringForPumps } from '#server/live/ring.ts';
import { announceAlarms } from '#server/mail/announce-alarms.ts';
import { passTime } from '#shared/domain/alarms/escalate.ts';
import type { Job, JobContext } from './job.ts';

/**
 * What time alone does to alarms: they escalate to the manager, ask again, come back from the shelf; a note that was
 * worked off comes back when its condition still holds a week later.
 */
export const escalateAlarms: Job = {
  name: 'escalate alarms',
  everyMs: 2_000,
  run: async (context) => {
    const now = context.now();
    const waiting = await listWaitingAlarms(context.pool, now);
    const due = waiting.filter(({ record }) => passTime(record, now)?.transition !== undefined);
    if (due.length === 0) return;
    const alarmIds = due.map(({ alarmId }) => alarmId);
    const { changes, mails } = await asMachine(context.pool, (_db, client) => escalate(context, client, alarmIds));
    await ringForPumps(context.pool, 'millrace_live', [...new Set(changes.map(({ pumpId }) => pumpId))]);
    if (mails > 0) await ring(context.pool, 'millrace_mail');
  },
};

async function escalate({ publicUrl, now }: JobContext, client: pg.PoolClient, alarmIds: readonly string[]) {
  const at = now();
  // Somebody may have acknowledged one since it was listed: locked, it is looked at again.
  const changes = (await lockAlarms(client, alarmIds)).flatMap((alarm) => changeOf(alarm, at) ?? []);
  await saveAlarmChanges(client, changes);
  const mails = await announceAlarms(client, changes, { publicUrl, now: at });
  return { changes, mails };
}

function changeOf(alarm: OpenAlarm, at: number): AlarmChange | undefined {
  const step = passTime(alarm.record, at);
  if (step?.transition === undefined) return undefined;
  return { ...alarm, record: step.record, transitions: [step.transition], isNew: false, isBacklog: false };
}
