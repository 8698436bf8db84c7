import type { AlarmAct } from '#shared/contract/http/alarm-acts.ts';
import type { Alarm } from '#shared/contract/http/alarms.ts';

type Kind = AlarmAct['kind'];
type Who = { readonly name: string; readonly now: number };

const seen = (alarm: Alarm, { name, now }: Who) => ({
  state: alarm.state === 'returned' ? ('normal' as const) : ('acknowledged' as const),
  acknowledgedAt: now,
  acknowledgedBy: name,
});

const CHANGES: {
  readonly [K in Kind]?: (alarm: Alarm, who: Who, act: Extract<AlarmAct, { kind: K }>) => Partial<Alarm>;
} = {
  acknowledge: (alarm, who) => seen(alarm, who),
  shelve: (_alarm, { name }, { until, reason }) => ({ shelvedUntil: until, shelvedBy: name, shelvedReason: reason }),
  unshelve: () => ({ shelvedUntil: null, shelvedBy: null, shelvedReason: null }),
  'take-out-of-service': (_alarm, { name, now }, { reason }) => ({
    outOfService: true,
    outOfServiceSince: { at: now, by: name, reason },
  }),
  'return-to-service': () => ({ outOfService: false, outOfServiceSince: null }),
  'nothing-to-do': (alarm, who, { note }) => ({
    ...(alarm.state === 'acknowledged' ? {} : seen(alarm, who)),
    answer: { at: who.now, by: who.name, note: note ?? null },
  }),
  'work-off': (_alarm, { name, now }, { found, cause }) => ({
    state: 'normal',
    done: { at: now, by: name, found, cause: cause ?? null },
  }),
};

/** The alarm as it will stand, shown before the server has answered; what only the server knows stays as it is. */
export function afterAct<K extends Kind>(
  alarm: Alarm,
  act: Extract<AlarmAct, { kind: K }> & { kind: K },
  who: Who,
): Alarm {
  return { ...alarm, ...CHANGES[act.kind]?.(alarm, who, act) };
}

const give = (to: Alarm['assignedTo']): AlarmAct =>
  to === null ? { kind: 'unassign' } : { kind: 'assign', technicianId: to.id };

/** What takes an act back, for the alarm as it was before it; undefined where nothing can. */
export function undoOf(before: Alarm, act: AlarmAct, now: number): AlarmAct | undefined {
  const { shelvedUntil, shelvedReason, outOfServiceSince, assignedTo } = before;
  switch (act.kind) {
    case 'acknowledge':
      return { kind: 'withdraw-acknowledgement' };
    case 'shelve':
      return { kind: 'unshelve' };
    case 'unshelve':
      return shelvedUntil === null || shelvedUntil <= now || shelvedReason === null
        ? undefined
        : { kind: 'shelve', until: shelvedUntil, reason: shelvedReason };
    case 'take-out-of-service':
      return { kind: 'return-to-service' };
    case 'return-to-service':
      return outOfServiceSince?.reason == null
        ? undefined
        : { kind: 'take-out-of-service', reason: outOfServiceSince.reason };
    case 'assign':
    case 'unassign':
      return give(assignedTo);
    case 'nothing-to-do':
      return { kind: 'withdraw-nothing-to-do' };
    case 'work-off':
      return { kind: 'withdraw-work-off' };
    default:
      return undefined;
  }
}
