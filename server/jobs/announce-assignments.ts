import { asMachine } from '#server/db/transaction.ts';
import type { OpenAlarm } from '#server/fold/alarm-change.ts';
import { saveAlarmChanges } from '#server/fold/alarms-repository.ts';
import { ring } from '#server/live/ring.ts';
import { type AnnouncedAlarm, announceAlarms } from '#server/mail/announce-alarms.ts';
import { makeStep } from '#shared/domain/alarms/alarm-record.ts';
import { markTold } from '#shared/domain/alarms/assign.ts';
import { lockUntoldAlarms } from './alarm-jobs-repository.ts';
import type { Job } from './job.ts';

/** Writes to technicians what a manager gave them: the request itself may not put mail into the outbox. */
export const announceAssignments: Job = {
  name: 'announce assignments',
  everyMs: 2_000,
  run: async ({ pool, publicUrl, now }) => {
    const mails = await asMachine(pool, async (_db, client) => {
      const untold = await lockUntoldAlarms(client);
      const told = untold.flatMap((alarm) => {
        const record = markTold(alarm.record);
        return record === undefined
          ? []
          : [{ ...alarm, record, transitions: [], isNew: false as const, isBacklog: false }];
      });
      await saveAlarmChanges(client, told);
      return announceAlarms(client, untold.flatMap(asAssigned), { publicUrl, now: now() });
    });
    if (mails > 0) await ring(pool, 'millrace_mail');
  },
};

/** The alarm with the change that is to be told of, which was stored when it was given. */
function asAssigned(alarm: OpenAlarm): AnnouncedAlarm[] {
  const { assignment } = alarm.record;
  if (assignment === null) return [];
  const { transition } = makeStep(alarm.record, 'assigned', assignment.at, assignment.by);
  return transition === undefined ? [] : [{ ...alarm, transitions: [transition], isBacklog: false }];
}
