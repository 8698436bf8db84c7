import { asMachine } from '#server/db/transaction.ts';
import { withdrawMails } from '#server/mail/withdraw-mails.ts';
import { listSetAsideWithMail } from './alarm-jobs-repository.ts';
import type { Job } from './job.ts';

/** No mail waits longer than this. */
const LONGEST_WAIT_MS = 30 * 86_400_000;

/** Takes back the mails of alarms that were shelved, suppressed or taken out of service before they left. */
export const silenceSetAside: Job = {
  name: 'silence what was set aside',
  everyMs: 2_000,
  run: async ({ pool, now }) => {
    const alarmIds = await listSetAsideWithMail(pool);
    // What became due meanwhile is not claimed, so that it can be withdrawn like the rest.
    if (alarmIds.length > 0)
      await asMachine(pool, (_db, client) => withdrawMails(client, alarmIds, now() - LONGEST_WAIT_MS));
  },
};
