import { type AlarmRecord, type AlarmTransition, isAnnounced } from '#shared/domain/alarms/alarm-record.ts';

/** Why a mail is written: `escalated` goes to the managers, everything else to whom the alarm goes. */
export type Announcement = {
  readonly reason: 'raised' | 'raised-again' | 'worse' | 're-alarmed' | 'shelf-ended' | 'escalated' | 'assigned';
  /** Names the change among all of the alarm: with the address it makes a mail unique. */
  readonly transition: string;
};

const REASONS: Partial<Record<AlarmTransition['kind'], Announcement['reason']>> = {
  raised: 'raised',
  'raised-again': 'raised-again',
  're-alarmed': 're-alarmed',
  'shelf-ended': 'shelf-ended',
  escalated: 'escalated',
};

/**
 * The one mail that an alarm's changes of a moment are worth: the last change that asks somebody to do something, while
 * the condition holds or comes and goes. Notes wait for the work list, and what is shelved, suppressed or out of service
 * calls nobody. Whoever is given an alarm or a note is told in any case, seen or not.
 */
export function chooseAnnouncement(
  record: AlarmRecord,
  transitions: readonly AlarmTransition[],
): Announcement | undefined {
  const stands = record.active || record.state === 'latched';
  if (!stands || record.state === 'normal' || !isAnnounced(record)) return undefined;
  const assigned = transitions.find(({ kind }) => kind === 'assigned');
  if (assigned !== undefined) return { reason: 'assigned', transition: `assigned ${assigned.at}` };
  const calls = record.alarmClass === 'alarm' && record.priority !== 'note';
  if (!calls || record.state === 'acknowledged') return undefined;
  for (const transition of transitions.toReversed()) {
    const reason = reasonOf(record, transition);
    if (reason !== undefined) return { reason, transition: `${transition.kind} ${transition.at}` };
  }
  return undefined;
}

function reasonOf(record: AlarmRecord, { kind, at }: AlarmTransition): Announcement['reason'] | undefined {
  // A change that asks for a new acknowledgement restarts the wait.
  return kind === 'changed' && record.waitingSince === at ? 'worse' : REASONS[kind];
}
