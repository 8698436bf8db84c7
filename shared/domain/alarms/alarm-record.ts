import type { AlarmClass, Detector, Evidence, Priority } from '../detectors/detector.ts';

/**
 * States of ISA-18.2. `returned` = back to normal, not yet acknowledged; `latched` = it chattered and waits for a
 * person; `normal` = returned and acknowledged: history. The table of states is from memory of the standard.
 */
export type AlarmState = 'unacknowledged' | 'acknowledged' | 'returned' | 'latched' | 'normal';

/** Who is to look after an alarm instead of the pad's own technician; `told` = their mail has been written. */
export type Assignment = { readonly to: string; readonly by: string; readonly at: number; readonly told: boolean };

/** The recorded answer that an alarm called for nothing; it teaches the rule's backtest. */
export type Answer = { readonly by: string; readonly at: number; readonly note: string | null };

/** A note somebody worked off: what they found, in words, and its cause where it is one that is weighed. */
export type Done = { readonly by: string; readonly at: number; readonly found: string; readonly cause: string | null };

export type Shelf = { readonly by: string; readonly reason: string; readonly at: number; readonly until: number };

/** One alarm of a pump and detector as it stands. Instants in ms; `by` is the id of a person. */
export type AlarmRecord = {
  readonly detector: Detector;
  readonly alarmClass: AlarmClass;
  readonly priority: Priority;
  readonly state: AlarmState;
  /** Whether the condition holds, whatever people did. */
  readonly active: boolean;
  readonly cause: string;
  readonly evidence: Evidence;
  readonly from: number;
  readonly raisedAt: number;
  readonly returnedAt: number | null;
  /** How often it was raised before somebody acknowledged its return. */
  readonly count: number;
  readonly acknowledgedAt: number | null;
  readonly acknowledgedBy: string | null;
  readonly acknowledgementNote: string | null;
  /** Since when it waits for an acknowledgement: raised, raised again, or re-alarmed. */
  readonly waitingSince: number;
  readonly escalatedAt: number | null;
  readonly shelf: Shelf | null;
  /** Suppressed by design: what explains it. */
  readonly suppressedBy: string | null;
  readonly outOfService: { readonly by: string; readonly reason: string; readonly at: number } | null;
  readonly assignment: Assignment | null;
  /** "Nothing to do", about its last raising. */
  readonly answer: Answer | null;
  /** A note that was worked off. While the condition still holds it is watched, so that it is not forgotten. */
  readonly done: Done | null;
  /** The last acknowledgement released a latch: withdrawing it latches again. */
  readonly releasedLatch: boolean;
  /** The last returns, newest last, at most three: what latches a chattering alarm. */
  readonly recentReturns: readonly number[];
};

export const TRANSITION_KINDS = [
  'raised',
  'raised-again',
  'changed',
  'returned',
  'latched',
  'acknowledged',
  'acknowledgement-withdrawn',
  'latch-released',
  'assigned',
  'unassigned',
  'nothing-to-do',
  'nothing-to-do-withdrawn',
  'done',
  'done-withdrawn',
  'still-stands',
  'escalated',
  're-alarmed',
  'shelved',
  'shelf-ended',
  'suppressed',
  'suppression-ended',
  'out-of-service',
  'returned-to-service',
] as const;
export type TransitionKind = (typeof TRANSITION_KINDS)[number];

/** What is stored of every change: who (null = Millrace itself), when, and how the alarm stood after it. */
export type AlarmTransition = {
  readonly kind: TransitionKind;
  readonly at: number;
  readonly by: string | null;
  readonly note: string | null;
  readonly priority: Priority;
  readonly cause: string;
  readonly evidence: Evidence;
};

/** The record after a step and the transition it made; no transition = nothing changed. */
export type AlarmStep = { readonly record: AlarmRecord; readonly transition: AlarmTransition | undefined };

/**
 * Whether an alarm is open: at most one per pump and detector.
 *
 * @example isOpen({ ...record, state: 'normal' }) // false: it is history
 */
export const isOpen = (record: AlarmRecord): boolean => record.state !== 'normal';

/**
 * Whether its detector's signals still concern it: open, or worked off while its condition holds.
 *
 * @example isWatched({ ...record, state: 'normal', done, active: true }) // true: its condition still holds
 */
export const isWatched = (record: AlarmRecord): boolean => isOpen(record) || (record.done !== null && record.active);

/**
 * Whether anyone should be called: neither shelved, suppressed by design nor out of service.
 *
 * @example isAnnounced({ ...record, shelf }) // false
 */
export const isAnnounced = (record: AlarmRecord): boolean =>
  record.shelf === null && record.suppressedBy === null && record.outOfService === null;

/**
 * A step that changes the record and records it; `by` and `note` default to Millrace itself.
 *
 * @example makeStep(record, 'escalated', at).transition?.by // null: Millrace itself
 */
export function makeStep(
  record: AlarmRecord,
  kind: TransitionKind,
  at: number,
  by: string | null = null,
  note: string | null = null,
): AlarmStep {
  const { priority, cause, evidence } = record;
  return { record, transition: { kind, at, by, note, priority, cause, evidence } };
}

/** A step that changes nothing. */
export const noStep = (record: AlarmRecord): AlarmStep => ({ record, transition: undefined });
