import { acknowledge, WITHDRAW_WITHIN_MS, waitAgain } from './acknowledge.ts';
import { type AlarmRecord, type AlarmStep, isOpen, makeStep, noStep } from './alarm-record.ts';

type Act = { readonly by: string; readonly at: number };

/**
 * Records that an alarm calls for nothing: whoever says so has seen it, the condition stays as it is. Undefined for
 * history.
 *
 * @example answerNothingToDo(active, { by: 'user-1', at: 1000, note: null })?.record.answer?.by // 'user-1'
 */
export function answerNothingToDo(
  record: AlarmRecord,
  act: Act & { readonly note: string | null },
): AlarmStep | undefined {
  if (!isOpen(record)) return undefined;
  if (record.answer !== null) return noStep(record);
  const seen = acknowledge(record, act).record;
  return makeStep({ ...seen, answer: { ...act } }, 'nothing-to-do', act.at, act.by, act.note);
}

/**
 * Takes one's own answer back within five minutes, with the acknowledgement that came with it; undefined otherwise.
 *
 * @example withdrawAnswer(answered, { by: whoAnswered, at: answeredAt + 60_000 })?.record.answer // null
 */
export function withdrawAnswer(record: AlarmRecord, act: Act): AlarmStep | undefined {
  const { answer, acknowledgedAt } = record;
  if (answer === null || answer.by !== act.by || act.at - answer.at > WITHDRAW_WITHIN_MS) return undefined;
  // Somebody had acknowledged it before the answer: that stands.
  const seenBefore = acknowledgedAt !== answer.at;
  const next = { ...(seenBefore ? record : waitAgain(record)), answer: null };
  return makeStep(next, 'nothing-to-do-withdrawn', act.at, act.by);
}
