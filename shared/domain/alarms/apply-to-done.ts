import type { AlarmSignal } from '../detectors/detector.ts';
import { DAY_MS } from '../time/local-time.ts';
import { type AlarmRecord, type AlarmStep, makeStep, noStep } from './alarm-record.ts';

type Later = Extract<AlarmSignal, { type: 'changed' | 'cleared' }>;

/**
 * What a detector says of a note that somebody worked off: its end shows that it is cured; that it became an alarm
 * opens it again; anything else is still the same matter.
 */
export function applyToDone(record: AlarmRecord, signal: Later): AlarmStep {
  if (signal.type === 'cleared')
    return makeStep({ ...record, active: false, returnedAt: signal.at }, 'returned', signal.at);
  if (signal.alarmClass === 'note') return noStep(record);
  const { alarmClass, priority, cause, evidence } = signal;
  return makeStep(reopened({ ...record, alarmClass, priority, cause, evidence }, signal.at), 'changed', signal.at);
}

/** How long after a note was worked off its condition may still hold before it comes back to the list, ms; common practice. */
export const CURED_WITHIN_MS = 7 * DAY_MS;

/** Brings a worked-off note back whose condition still holds a week later; undefined where that is not so. */
export function checkCure(record: AlarmRecord, at: number): AlarmStep | undefined {
  const { done, state, active } = record;
  if (done === null || state !== 'normal' || !active || at < done.at + CURED_WITHIN_MS) return undefined;
  return makeStep(reopened(record, at), 'still-stands', at, null, done.found);
}

const reopened = (record: AlarmRecord, at: number): AlarmRecord => ({
  ...record,
  state: 'unacknowledged',
  count: record.count + 1,
  waitingSince: at,
  escalatedAt: null,
  done: null,
  answer: null,
});
