import type { AlarmAct } from '#shared/contract/http/alarm-acts.ts';
import type { Alarm } from '#shared/contract/http/alarms.ts';

type Who = {
  readonly name: string;
  readonly at: number;
  readonly technicians: readonly { readonly id: string; readonly name: string }[];
};

const SEEN_NEVER = { acknowledgedAt: null, acknowledgedBy: null, acknowledgementNote: null } as const;

/** What an act changes of an alarm on screen, as the real server's state machine would. */
export function changeByAct(alarm: Alarm, act: AlarmAct, { name, at, technicians }: Who): Partial<Alarm> {
  const seen = { state: 'acknowledged', acknowledgedAt: at, acknowledgedBy: name } as const;
  switch (act.kind) {
    case 'acknowledge':
      return { ...seen, acknowledgementNote: act.note ?? null };
    case 'withdraw-acknowledgement':
      return { state: 'unacknowledged', ...SEEN_NEVER };
    case 'shelve':
      return { shelvedUntil: act.until, shelvedBy: name, shelvedReason: act.reason };
    case 'unshelve':
      return { shelvedUntil: null, shelvedBy: null, shelvedReason: null };
    case 'take-out-of-service':
      return { outOfService: true, outOfServiceSince: { at, by: name, reason: act.reason } };
    case 'return-to-service':
      return { outOfService: false, outOfServiceSince: null };
    case 'assign':
      return assignedTo(technicians.find(({ id }) => id === act.technicianId));
    case 'unassign':
      return { assignedTo: null };
    case 'nothing-to-do':
      return { ...seen, answer: { at, by: name, note: act.note ?? null } };
    case 'withdraw-nothing-to-do':
      return { state: 'unacknowledged', ...SEEN_NEVER, answer: null };
    case 'work-off':
      return { state: 'normal', done: { at, by: name, found: act.found, cause: act.cause ?? null } };
    case 'withdraw-work-off':
      return { state: alarm.acknowledgedAt === null ? 'unacknowledged' : 'acknowledged', done: null };
  }
}

const assignedTo = (technician: Who['technicians'][number] | undefined): Partial<Alarm> =>
  technician === undefined ? {} : { assignedTo: { ...technician }, technicianName: technician.name };
