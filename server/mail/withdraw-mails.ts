import type pg from 'pg';
import { lockMailMemory, type MailMemory, saveMailMemory } from './mail-states-repository.ts';
import { type Withdrawal, type WithdrawnMail, withdrawMails as withdrawRows } from './outbox-repository.ts';

/**
 * Takes back mails that have not left and are needed no more, and forgets that they were planned: the next mail about the
 * pad is its first again. Answers the alarms of which nobody was to hear yet.
 */
export async function withdrawMails(
  client: Pick<pg.ClientBase, 'query'>,
  withdrawal: Withdrawal,
  now: number,
): Promise<Set<string>> {
  const withdrawn = await withdrawRows(client, withdrawal, now);
  const unplanned = withdrawn.filter(({ isShared }) => !isShared);
  if (unplanned.length > 0) {
    const memory = await lockMailMemory(client, unplanned.flatMap(listSubjects));
    for (const mail of unplanned) forget(memory, mail);
    await saveMailMemory(client, memory);
  }
  return new Set(withdrawn.filter(({ isHeard }) => !isHeard).map(({ alarmId }) => alarmId));
}

const listSubjects = ({ companyId, padId, recipientUserId }: WithdrawnMail) => [
  { kind: 'pad' as const, id: padId, companyId },
  { kind: 'person' as const, id: recipientUserId, companyId },
];

function forget({ pads, persons }: MailMemory, { padId, recipientUserId, dueAt }: WithdrawnMail): void {
  const { [recipientUserId]: plan, ...others } = pads.get(padId) ?? {};
  // A first mail that left stays remembered: only one that was itself the first is as if it had never been.
  if (plan?.first === true && plan.lastAt === dueAt) pads.set(padId, others);
  const sentAt = persons.get(recipientUserId)?.sentAt ?? [];
  persons.set(recipientUserId, { sentAt: sentAt.filter((at) => at !== dueAt) });
}
