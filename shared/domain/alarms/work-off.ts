import { WITHDRAW_WITHIN_MS } from './acknowledge.ts';
import { type AlarmRecord, type AlarmStep, isOpen, makeStep } from './alarm-record.ts';

type Act = { readonly by: string; readonly at: number };

/**
 * Closes a note of the work list with what was found: it goes to history, and is watched there for as long as its
 * condition holds. Undefined for an alarm (only its condition's end closes one), for history, and without words.
 *
 * @example workOff(note, { by: 'user-1', at: 1000, found: 'Set the clock', cause: null })?.record.state // 'normal'
 */
export function workOff(
  record: AlarmRecord,
  act: Act & { readonly found: string; readonly cause: string | null },
): AlarmStep | undefined {
  const found = act.found.trim();
  if (record.alarmClass !== 'note' || !isOpen(record) || found === '') return undefined;
  const done = { by: act.by, at: act.at, found, cause: act.cause };
  return makeStep({ ...record, state: 'normal', shelf: null, done }, 'done', act.at, act.by, found);
}

/**
 * Puts a note back on the list, by whoever worked it off and within five minutes; undefined otherwise.
 *
 * @example withdrawDone(workedOff, { by: whoDidIt, at: doneAt + 60_000 })?.record.done // null
 */
export function withdrawDone(record: AlarmRecord, act: Act): AlarmStep | undefined {
  const { done } = record;
  if (done === null || done.by !== act.by || act.at - done.at > WITHDRAW_WITHIN_MS) return undefined;
  // A note whose condition ended meanwhile has nothing left to be done.
  if (!record.active) return undefined;
  return makeStep({ ...record, state: 'unacknowledged', done: null }, 'done-withdrawn', act.at, act.by);
}
