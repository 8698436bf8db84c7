import type { AlarmAct } from '#shared/contract/http/alarm-acts.ts';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import type { Role } from '#shared/contract/primitives.ts';

/** What a row or a page offers beside acknowledging; each works at once or asks for what it needs. */
export const OFFERED = [
  'work-off',
  'unshelve',
  'return-to-service',
  'shelve',
  'nothing-to-do',
  'assign',
  'unassign',
  'take-out-of-service',
] as const satisfies readonly AlarmAct['kind'][];
export type Offered = (typeof OFFERED)[number];

const MANAGERS_ONLY: readonly Offered[] = ['assign', 'unassign', 'take-out-of-service', 'return-to-service'];

const FITS: Readonly<Record<Offered, (alarm: Alarm) => boolean>> = {
  'work-off': ({ alarmClass }) => alarmClass === 'note',
  shelve: ({ shelvedUntil, outOfService }) => shelvedUntil === null && !outOfService,
  unshelve: ({ shelvedUntil }) => shelvedUntil !== null,
  'nothing-to-do': ({ alarmClass, answer }) => alarmClass === 'alarm' && answer === null,
  assign: () => true,
  unassign: ({ assignedTo }) => assignedTo !== null,
  'take-out-of-service': ({ outOfService }) => !outOfService,
  'return-to-service': ({ outOfService }) => outOfService,
};

/** What somebody in a role may do now about an alarm, most wanted first; nothing about history. */
export const listOffered = (alarm: Alarm, role: Role): Offered[] =>
  alarm.state === 'normal' || role === 'homeowner'
    ? []
    : OFFERED.filter((kind) => FITS[kind](alarm) && (role === 'manager' || !MANAGERS_ONLY.includes(kind)));

/** What may be done to all of several at once: what each of them offers. */
export const listOfferedForAll = (alarms: readonly Alarm[], role: Role): Offered[] =>
  OFFERED.filter((kind) => kind !== 'work-off' && alarms.every((alarm) => listOffered(alarm, role).includes(kind)));
