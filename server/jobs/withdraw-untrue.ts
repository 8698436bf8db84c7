import { asMachine } from '#server/db/transaction.ts';
import { listUntrueMails } from '#server/mail/outbox-repository.ts';
import { withdrawMails } from '#server/mail/withdraw-mails.ts';
import type { Job } from './job.ts';

/**
 * Takes back the mails that no longer tell the truth and have not left, first tries and later ones alike: of alarms that
 * were set aside or are over. Until then they are not sent (`UNTRUE`), so that a hold silences at once.
 */
export const withdrawUntrue: Job = {
  name: 'withdraw untrue mails',
  everyMs: 2_000,
  run: async ({ pool, now }) => {
    const mailIds = await listUntrueMails(pool);
    if (mailIds.length > 0) await asMachine(pool, (_db, client) => withdrawMails(client, { mailIds }, now()));
  },
};
