import { createHash } from 'node:crypto';
import type pg from 'pg';
import { newId } from '#server/db/new-id.ts';
import type { AlarmRecord, AlarmTransition } from '#shared/domain/alarms/alarm-record.ts';
import { planMail } from '#shared/domain/alarms/plan-mail.ts';
import type { FoundCounts } from '#shared/domain/causes/rank-causes.ts';
import { type Announcement, chooseAnnouncement } from './choose-announcement.ts';
import { composeAlarmMail } from './compose-alarm-mail.ts';
import { foundKey, listFoundCauses } from './found-causes-repository.ts';
import { listAlarmPlaces, placeKey } from './list-alarm-places.ts';
import { findMailHoursBegin } from './mail-hours.ts';
import type { MailPerson, MailPlace } from './mail-place.ts';
import { listMailPersons } from './mail-places-repository.ts';
import { lockMailMemory, type MailMemory, saveMailMemory } from './mail-states-repository.ts';
import { enqueueMails, type OutboxMail } from './outbox-repository.ts';

/** A changed alarm, as far as mail cares. */
export type AnnouncedAlarm = {
  readonly alarmId: string;
  readonly companyId: string;
  /** null = it speaks for several pumps. */
  readonly pumpId: string | null;
  readonly padId: string | null;
  readonly record: AlarmRecord;
  readonly transitions: readonly AlarmTransition[];
  /** Raised from a backlog: its mail waits a little, in case the rest of the backlog clears it. */
  readonly isBacklog: boolean;
};

export type AnnounceOptions = { readonly publicUrl: string; readonly now: number };

type Matter = {
  readonly alarm: AnnouncedAlarm;
  readonly announcement: Announcement;
  readonly place: MailPlace;
  readonly person: MailPerson;
  readonly found: FoundCounts | undefined;
};

/** Long enough for the rest of a backlog to be folded. */
const BACKLOG_PATIENCE_MS = 60_000;

/**
 * Puts the mails that changed alarms are worth into the outbox, in the transaction that stores the change: when they
 * leave is what the mail policy says, what they say is frozen now. Answers how many.
 */
export async function announceAlarms(
  client: Pick<pg.ClientBase, 'query'>,
  alarms: readonly AnnouncedAlarm[],
  options: AnnounceOptions,
): Promise<number> {
  const worth = alarms.flatMap((alarm) => {
    const announcement = chooseAnnouncement(alarm.record, alarm.transitions);
    return announcement === undefined ? [] : [{ alarm, announcement }];
  });
  if (worth.length === 0) return 0;
  const places = await listAlarmPlaces(
    client,
    worth.map(({ alarm }) => alarm),
  );
  const assignees = await listMailPersons(
    client,
    worth.flatMap(({ alarm }) => alarm.record.assignment?.to ?? []),
  );
  const found = await listFoundCauses(
    client,
    worth.map(({ alarm: { companyId, record } }) => ({ companyId, detector: record.detector })),
  );
  const matters: Matter[] = worth.flatMap(({ alarm, announcement }) => {
    const place = places.get(placeKey(alarm));
    if (place === undefined) return [];
    const assignee = assignees.get(alarm.record.assignment?.to ?? '');
    return listRecipients(place, assignee, announcement).map((person) => ({
      alarm,
      announcement,
      place,
      person,
      found: found.get(foundKey(alarm.companyId, alarm.record.detector)),
    }));
  });
  const memory = await lockMailMemory(client, matters.flatMap(listSubjects));
  const mails = matters.map((matter) => planOne(matter, memory, options));
  await saveMailMemory(client, memory);
  await enqueueMails(client, mails);
  return mails.length;
}

/**
 * Who was given the alarm, else the technician responsible for the pad; the managers when nobody acknowledged, or when
 * there is no technician.
 */
function listRecipients(
  { technician, managers }: MailPlace,
  assignee: MailPerson | undefined,
  { reason }: Announcement,
): readonly MailPerson[] {
  const responsible = assignee ?? technician;
  return reason === 'escalated' || responsible === undefined ? managers : [responsible];
}

const listSubjects = ({ alarm: { companyId }, place, person }: Matter) => [
  { kind: 'pad' as const, id: place.padId, companyId },
  { kind: 'person' as const, id: person.userId, companyId },
];

function planOne(matter: Matter, memory: MailMemory, { publicUrl, now }: AnnounceOptions): OutboxMail {
  const { alarm, announcement, place, person, found } = matter;
  const padMemory = memory.pads.get(place.padId) ?? {};
  const plan = planMail({
    at: alarm.isBacklog ? now + BACKLOG_PATIENCE_MS : now,
    priority: alarm.record.priority,
    hoursBeginAt: findMailHoursBegin(place.mailHours, place.companyZone, now),
    pad: padMemory[person.userId],
    person: memory.persons.get(person.userId) ?? { sentAt: [] },
  });
  memory.pads.set(place.padId, { ...padMemory, [person.userId]: plan.pad });
  memory.persons.set(person.userId, plan.person);
  const { alarmId, companyId } = alarm;
  const { transition } = announcement;
  const composed = composeAlarmMail({
    alarmId,
    record: alarm.record,
    place,
    announcement,
    publicUrl,
    found,
    isGroup: alarm.pumpId === null,
  });
  const key = createHash('sha256').update(`${alarmId} ${transition} ${person.address}`).digest('hex').slice(0, 40);
  return {
    id: newId(now),
    companyId,
    alarmId,
    transition,
    recipientUserId: person.userId,
    address: person.address,
    ...composed,
    messageId: `<${key}@${new URL(publicUrl).hostname}>`,
    dueAt: plan.leavesAt,
  };
}
