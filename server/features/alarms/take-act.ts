import type { AlarmAct } from '#shared/contract/http/alarm-acts.ts';
import { acknowledge, withdrawAcknowledgement } from '#shared/domain/alarms/acknowledge.ts';
import { type AlarmRecord, type AlarmStep, isOpen } from '#shared/domain/alarms/alarm-record.ts';
import { answerNothingToDo, withdrawAnswer } from '#shared/domain/alarms/answer.ts';
import { assign, endAssignment } from '#shared/domain/alarms/assign.ts';
import {
  endShelf,
  LONGEST_SHELF_MS,
  returnToService,
  shelve,
  takeOutOfService,
} from '#shared/domain/alarms/set-aside.ts';
import { withdrawDone, workOff } from '#shared/domain/alarms/work-off.ts';

/** Who does it and when; `name` is that of the technician an alarm is given to. */
export type ActBy = { readonly by: string; readonly at: number; readonly name: string };

/** What an act makes of an alarm, or why it cannot be done: a sentence for whoever asked. */
export type ActOutcome = { readonly step: AlarmStep } | { readonly refusal: string };

type Kind = AlarmAct['kind'];
type ActOf<K extends Kind> = Extract<AlarmAct, { kind: K }>;

const OWN = 'and only within five minutes.';
const HISTORY = 'This alarm is over.';

const orRefuse = (step: AlarmStep | undefined, refusal: string): ActOutcome =>
  step === undefined ? { refusal } : { step };

const whileOpen = (record: AlarmRecord, step: () => AlarmStep | undefined, refusal = HISTORY): ActOutcome =>
  isOpen(record) ? orRefuse(step(), refusal) : { refusal: HISTORY };

const ACTS: { readonly [K in Kind]: (record: AlarmRecord, who: ActBy, act: ActOf<K>) => ActOutcome } = {
  acknowledge: (record, { by, at }, { note }) => ({ step: acknowledge(record, { by, at, note: wordsOf(note) }) }),
  'withdraw-acknowledgement': (record, { by, at }) =>
    orRefuse(withdrawAcknowledgement(record, { by, at }), `Only your own acknowledgement can be taken back, ${OWN}`),
  shelve: (record, { by, at }, { until, reason }) =>
    whileOpen(
      record,
      () => shelve(record, { by, at, until, reason }),
      `A hold ends in the future and within ${LONGEST_SHELF_MS / 86_400_000} days. For longer, take it out of service.`,
    ),
  unshelve: (record, { by, at }) => ({ step: endShelf(record, { by, at }) }),
  'take-out-of-service': (record, { by, at }, { reason }) =>
    whileOpen(record, () => takeOutOfService(record, { by, at, reason })),
  'return-to-service': (record, { by, at }) => ({ step: returnToService(record, { by, at }) }),
  assign: (record, { by, at, name }, { technicianId }) =>
    whileOpen(record, () => assign(record, { by, at, to: technicianId, name })),
  unassign: (record, { by, at }) => ({ step: endAssignment(record, { by, at }) }),
  'nothing-to-do': (record, { by, at }, { note }) =>
    whileOpen(record, () => answerNothingToDo(record, { by, at, note: wordsOf(note) })),
  'withdraw-nothing-to-do': (record, { by, at }) =>
    orRefuse(withdrawAnswer(record, { by, at }), `Only your own answer can be taken back, ${OWN}`),
  'work-off': (record, { by, at }, { found, cause }) =>
    whileOpen(
      record,
      () => workOff(record, { by, at, found, cause: cause ?? null }),
      'Only a note is closed by hand: an alarm ends when its condition does.',
    ),
  'withdraw-work-off': (record, { by, at }) =>
    orRefuse(withdrawDone(record, { by, at }), `Only your own note can be put back, while it still holds, ${OWN}`),
};

const wordsOf = (note: string | undefined): string | null => (note === undefined || note === '' ? null : note);

/** Does one thing to an alarm's record. */
export function takeAct<K extends Kind>(record: AlarmRecord, who: ActBy, act: ActOf<K> & { kind: K }): ActOutcome {
  return ACTS[act.kind](record, who, act);
}
