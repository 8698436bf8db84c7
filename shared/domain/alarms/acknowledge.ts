import { type AlarmRecord, type AlarmStep, makeStep, noStep } from './alarm-record.ts';

/** How long a person may take back an acknowledgement of their own. */
export const WITHDRAW_WITHIN_MS = 5 * 60_000;

/**
 * Marks an alarm as seen by a person. It never clears a condition: an active alarm stays, a returned one becomes
 * history; one that was latched for chattering is released. Repeating it changes nothing.
 *
 * @example acknowledge(active, { by: 'user-1', at: 1000, note: null }).record.state // 'acknowledged'
 */
export function acknowledge(
  record: AlarmRecord,
  act: { readonly by: string; readonly at: number; readonly note: string | null },
): AlarmStep {
  if (record.state === 'acknowledged' || record.state === 'normal') return noStep(record);
  const next: AlarmRecord = {
    ...record,
    state: record.active ? 'acknowledged' : 'normal',
    acknowledgedAt: act.at,
    acknowledgedBy: act.by,
    acknowledgementNote: act.note,
    releasedLatch: record.state === 'latched',
    recentReturns: [],
  };
  return makeStep(next, next.releasedLatch ? 'latch-released' : 'acknowledged', act.at, act.by, act.note);
}

/**
 * Takes back one's own acknowledgement within five minutes; undefined where it cannot be taken back. The alarm waits
 * again from the moment it first did, so that undoing never buys time.
 *
 * @example withdrawAcknowledgement(seen, { by: whoSawIt, at: seenAt + 60_000 })?.record.state // 'unacknowledged'
 */
export function withdrawAcknowledgement(
  record: AlarmRecord,
  act: { readonly by: string; readonly at: number },
): AlarmStep | undefined {
  const { acknowledgedAt, acknowledgedBy } = record;
  if (acknowledgedAt === null || acknowledgedBy !== act.by || act.at - acknowledgedAt > WITHDRAW_WITHIN_MS)
    return undefined;
  return makeStep(waitAgain(record), 'acknowledgement-withdrawn', act.at, act.by);
}

/** The alarm as it waited before anybody had seen it. */
export const waitAgain = (record: AlarmRecord): AlarmRecord => ({
  ...record,
  state: record.releasedLatch ? 'latched' : record.active ? 'unacknowledged' : 'returned',
  releasedLatch: false,
  acknowledgedAt: null,
  acknowledgedBy: null,
  acknowledgementNote: null,
});
