import { asMachine } from '#server/db/transaction.ts';
import type { AlarmChange } from '#server/fold/alarm-change.ts';
import { saveAlarmChanges } from '#server/fold/alarms-repository.ts';
import { ringForPumps } from '#server/live/ring.ts';
import { endExplanation } from '#shared/domain/alarms/explanation.ts';
import { type ExplainedAlarm, listExplainedAlarms, lockExplainedAlarms } from './alarm-jobs-repository.ts';
import type { Job } from './job.ts';

/** Ends a suppression by design once nothing explains the alarm any more: the pad is open again, its cause is over. */
export const endExplanations: Job = {
  name: 'end explanations',
  everyMs: 5_000,
  run: async ({ pool, now }) => {
    const due = (await listExplainedAlarms(pool)).flatMap((explained) => changeOf(explained, now()) ?? []);
    if (due.length === 0) return;
    const alarmIds = due.map(({ alarmId }) => alarmId);
    const changes = await asMachine(pool, async (_db, client) => {
      // Something may explain one again since it was listed: locked, it is looked at once more.
      const explained = await lockExplainedAlarms(client, alarmIds);
      const ended = explained.flatMap((one) => changeOf(one, now()) ?? []);
      await saveAlarmChanges(client, ended);
      return ended;
    });
    if (changes.length > 0)
      await ringForPumps(pool, 'millrace_live', [...new Set(changes.map(({ pumpId }) => pumpId))]);
  },
};

function changeOf({ alarm, pump }: ExplainedAlarm, at: number): AlarmChange | undefined {
  const step = endExplanation(alarm.record, pump, at);
  if (step?.transition === undefined) return undefined;
  return { ...alarm, record: step.record, transitions: [step.transition], isNew: false, isBacklog: false };
}
