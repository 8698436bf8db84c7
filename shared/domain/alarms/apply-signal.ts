import { type AlarmSignal, isWorse } from '../detectors/detector.ts';
import { type AlarmRecord, type AlarmStep, isWatched, makeStep, noStep } from './alarm-record.ts';
import { applyToDone } from './apply-to-done.ts';
import { explanationOf, isExplanation } from './explanation.ts';

type Raised = Extract<AlarmSignal, { type: 'raised' }>;
type Changed = Extract<AlarmSignal, { type: 'changed' }>;
type Cleared = Extract<AlarmSignal, { type: 'cleared' }>;

/** Three returns within this time latch an alarm as chattering (a starting rule quoted for ISA-18.2, see the facts). */
export const CHATTERING_WINDOW_MS = 60_000;
export const CHATTERING_RETURNS = 3;

/**
 * Takes a detector's signal into the alarm of its pump and detector. `current` is the newest alarm of the two, if any;
 * the step's record is a new alarm when `current` is history (or missing) and the signal raises. Undefined where the
 * signal speaks of an alarm that is not open.
 *
 * @example applySignal(undefined, raised)?.record.state // 'unacknowledged'
 */
export function applySignal(current: AlarmRecord | undefined, signal: AlarmSignal): AlarmStep | undefined {
  const open = current !== undefined && isWatched(current) ? current : undefined;
  if (signal.type === 'raised') return open === undefined ? raiseNew(signal) : raiseAgain(open, signal);
  if (open === undefined) return undefined;
  if (open.done !== null) return applyToDone(open, signal);
  return signal.type === 'changed' ? change(open, signal) : clear(open, signal);
}

function raiseNew(signal: Raised): AlarmStep {
  const record: AlarmRecord = {
    detector: signal.detector,
    alarmClass: signal.alarmClass,
    priority: signal.priority,
    state: 'unacknowledged',
    active: true,
    cause: signal.cause,
    evidence: signal.evidence,
    from: signal.from,
    raisedAt: signal.at,
    returnedAt: null,
    count: 1,
    acknowledgedAt: null,
    acknowledgedBy: null,
    acknowledgementNote: null,
    waitingSince: signal.at,
    escalatedAt: null,
    shelf: null,
    suppressedBy: null,
    outOfService: null,
    assignment: null,
    answer: null,
    done: null,
    releasedLatch: false,
    recentReturns: [],
  };
  return makeStep(record, 'raised', signal.at);
}

/**
 * Raised again before its return was acknowledged: the same alarm, counted; a latched one stays latched. What explained
 * it does so no longer, and an answer was about the time before.
 */
function raiseAgain(open: AlarmRecord, signal: Raised): AlarmStep {
  if (open.active && open.done === null) return change(open, { ...signal, type: 'changed' });
  const record: AlarmRecord = {
    ...open,
    alarmClass: signal.alarmClass,
    priority: signal.priority,
    state: open.state === 'latched' ? 'latched' : 'unacknowledged',
    active: true,
    cause: signal.cause,
    evidence: signal.evidence,
    returnedAt: null,
    count: open.count + 1,
    suppressedBy: isExplanation(open.suppressedBy) ? null : open.suppressedBy,
    answer: null,
    done: null,
    releasedLatch: false,
    waitingSince: open.state === 'latched' ? open.waitingSince : signal.at,
    escalatedAt: open.state === 'latched' ? open.escalatedAt : null,
  };
  return makeStep(record, 'raised-again', signal.at);
}

/** A rise in priority, or a note that becomes an alarm, asks for a new acknowledgement; a fall does not. */
function change(open: AlarmRecord, signal: Changed): AlarmStep {
  const worse =
    isWorse(signal.priority, open.priority) || (open.alarmClass === 'note' && signal.alarmClass === 'alarm');
  const again = worse && open.state === 'acknowledged';
  const record: AlarmRecord = {
    ...open,
    alarmClass: signal.alarmClass,
    priority: signal.priority,
    cause: signal.cause,
    evidence: signal.evidence,
    state: again ? 'unacknowledged' : open.state,
    waitingSince: worse ? signal.at : open.waitingSince,
    escalatedAt: worse ? null : open.escalatedAt,
  };
  return makeStep(record, 'changed', signal.at);
}

/**
 * A note needs no acknowledgement: its return is history at once. One that is hushed because something explains it has
 * not returned: it is suppressed by design until the explanation ends (`endExplanation`) or its detector speaks again.
 */
function clear(open: AlarmRecord, signal: Cleared): AlarmStep {
  if (!open.active) return noStep(open);
  const explanation = explanationOf(signal.evidence);
  if (explanation !== undefined) {
    const hushed: AlarmRecord = { ...open, active: false, returnedAt: signal.at, suppressedBy: explanation };
    return makeStep(hushed, 'suppressed', signal.at, null, explanation);
  }
  const recentReturns = [...open.recentReturns, signal.at].slice(-CHATTERING_RETURNS);
  const oldest = recentReturns[0] ?? signal.at;
  const chatters = recentReturns.length === CHATTERING_RETURNS && signal.at - oldest <= CHATTERING_WINDOW_MS;
  const rest: AlarmRecord = { ...open, active: false, returnedAt: signal.at, recentReturns };
  if (open.state === 'latched' || chatters) {
    return makeStep({ ...rest, state: 'latched' }, open.state === 'latched' ? 'returned' : 'latched', signal.at);
  }
  // Another alarm spoke for it: nobody was called, and nobody has to answer.
  const isCovered = open.suppressedBy !== null;
  const finished = open.state === 'acknowledged' || open.alarmClass === 'note' || isCovered;
  return makeStep({ ...rest, state: finished ? 'normal' : 'returned' }, 'returned', signal.at);
}
