import type { Priority } from '../detectors/detector.ts';
import { type AlarmRecord, type AlarmStep, isAnnounced, makeStep } from './alarm-record.ts';
import { checkCure } from './apply-to-done.ts';

const MINUTE_MS = 60_000;
const HOUR_MS = 60 * MINUTE_MS;

/** How long an alarm of a priority may wait for an acknowledgement before it escalates, ms; a note never does. */
export const ACKNOWLEDGE_WITHIN_MS: Readonly<Record<Priority, number | undefined>> = {
  urgent: 15 * MINUTE_MS,
  soon: 4 * HOUR_MS,
  note: undefined,
};

/** How long an acknowledged alarm may stay active before it asks again, ms (common practice). */
export const RE_ALARM_AFTER_MS: Readonly<Record<Priority, number | undefined>> = {
  urgent: 12 * HOUR_MS,
  soon: 72 * HOUR_MS,
  note: undefined,
};

/**
 * When an alarm escalates if nobody acknowledges it; undefined where it never will. One that chatters waits like any
 * other: that its condition comes and goes makes it no less urgent.
 */
export function escalatesAt(record: AlarmRecord): number | undefined {
  const within = ACKNOWLEDGE_WITHIN_MS[record.priority];
  const unseen = record.state === 'unacknowledged' || record.state === 'latched';
  const waits = unseen && record.escalatedAt === null && record.alarmClass === 'alarm';
  return within !== undefined && waits && isAnnounced(record) ? record.waitingSince + within : undefined;
}

/** When an acknowledged alarm that is still active asks again; undefined where it never will. */
export function reAlarmsAt(record: AlarmRecord): number | undefined {
  const after = RE_ALARM_AFTER_MS[record.priority];
  if (after === undefined || record.state !== 'acknowledged' || record.acknowledgedAt === null) return undefined;
  return isAnnounced(record) ? record.acknowledgedAt + after : undefined;
}

/**
 * What time alone does to an alarm: it escalates, asks again, its shelf ends, or a note that was worked off proves not
 * to be cured. Undefined where nothing is due.
 *
 * @example passTime(waiting, waiting.waitingSince + 15 * 60_000)?.transition?.kind // 'escalated' (urgent)
 */
export function passTime(record: AlarmRecord, at: number): AlarmStep | undefined {
  if (record.done !== null) return checkCure(record, at);
  if (record.shelf !== null && at >= record.shelf.until) {
    return makeStep({ ...record, shelf: null, waitingSince: at }, 'shelf-ended', at);
  }
  const escalation = escalatesAt(record);
  if (escalation !== undefined && at >= escalation) return makeStep({ ...record, escalatedAt: at }, 'escalated', at);
  const again = reAlarmsAt(record);
  if (again === undefined || at < again) return undefined;
  const asked: AlarmRecord = { ...record, state: 'unacknowledged', waitingSince: at, escalatedAt: null };
  return makeStep(asked, 're-alarmed', at);
}
