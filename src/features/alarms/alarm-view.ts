import type { Alarm } from '#shared/contract/http/alarms.ts';
import { instantOf } from '#shared/domain/time/instant-of.ts';
import { DAY_MS } from '#shared/domain/time/local-time.ts';
import { alarmTitle } from '#shared/domain/wording/alarm-title.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { isPlainKey, t } from '#src/lib/messages/page-words.ts';

/** Since when it stands, or from when to when it stood, in the pad's time. */
export function describeSpan({ from, returnedAt, zone, count }: Alarm, format: Format, now: number): string {
  const span =
    returnedAt === null
      ? t('alarm.since', { time: format.moment(from, zone, now), span: format.span(now - from) })
      : t('alarm.lasted', { from: format.moment(from, zone, now), to: format.moment(returnedAt, zone, now) });
  return count > 1 ? `${span} · ${t('alarm.times', { count })}` : span;
}

/** What stands over it: out of service, suppressed, on hold, each with why. */
function describeAside(alarm: Alarm, moment: (at: number) => string): string[] {
  const { outOfService, outOfServiceSince, shelvedUntil, shelvedBy, shelvedReason } = alarm;
  const parts: string[] = [];
  const because = (what: string, reason: string | null | undefined) =>
    parts.push(reason == null || reason === '' ? what : t('alarm.because', { what, reason }));
  if (outOfServiceSince !== null) {
    const { at, by, reason } = outOfServiceSince;
    because(t('alarm.outOfServiceBy', { time: moment(at), name: by ?? '–' }), reason);
  } else if (outOfService) parts.push(t('alarm.outOfService'));
  if (alarm.suppressed) parts.push(describeSuppression(alarm));
  if (shelvedUntil !== null)
    because(t('alarm.shelved', { time: moment(shelvedUntil), name: shelvedBy ?? '–' }), shelvedReason);
  return parts;
}

/** What explains a suppressed alarm, in words. */
function describeSuppression({ suppressedBy }: Alarm): string {
  if (suppressedBy?.padState != null) {
    const key = `pad-state.${suppressedBy.padState}`;
    return t('alarm.suppressedByPad', { state: isPlainKey(key) ? t(key) : suppressedBy.padState });
  }
  if (suppressedBy?.detector != null)
    return t('alarm.suppressedByAlarm', { title: alarmTitle(suppressedBy.detector, 'unknown', {}) });
  return t('alarm.suppressed');
}

/** Who saw it and when; a homeowner is not told who. `again` = it waits once more. */
function describeSeer(by: string | null, time: string, again: boolean): string {
  if (by === null)
    return t(again ? 'alarm.state.asksAgain.bySomebody' : 'alarm.state.acknowledged.bySomebody', { time });
  return t(again ? 'alarm.state.asksAgain' : 'alarm.state.acknowledged', { name: by, time });
}

/** Who has seen it and how it stands. */
function describeSeen(alarm: Alarm, moment: (at: number) => string, now: number): string[] {
  const { state, acknowledgedAt, acknowledgedBy: by, alarmClass } = alarm;
  if (state === 'returned') return [t('alarm.state.returned', { time: moment(alarm.returnedAt ?? now) })];
  // One that stood so long that it asks again waits, and still says who saw it first.
  if (acknowledgedAt !== null && state !== 'latched')
    return [describeSeer(by, moment(acknowledgedAt), state === 'unacknowledged')];
  if (state === 'latched') return [t('alarm.state.latched')];
  // A note waits for a stop, not for somebody to say that they have seen it.
  return state === 'unacknowledged' && alarmClass === 'alarm' ? [t('alarm.state.unacknowledged')] : [];
}

/** Who has seen it and what stands over it, in the order in which it matters. */
export function describeState(alarm: Alarm, format: Format, now: number): string {
  const moment = (at: number) => format.moment(at, alarm.zone, now);
  const parts = [...describeAside(alarm, moment), ...describeSeen(alarm, moment, now)];
  if (alarm.answer !== null) {
    const what = t('alarm.answered', { name: alarm.answer.by ?? '–' });
    parts.push(alarm.answer.note === null ? what : t('alarm.because', { what, reason: alarm.answer.note }));
  }
  if (alarm.done !== null) parts.push(t('alarm.done', { name: alarm.done.by ?? '–', time: moment(alarm.done.at) }));
  else if (alarm.state === 'normal') parts.push(t('alarm.state.normal'));
  if (alarm.escalatedAt !== null) parts.push(t('alarm.escalated', { time: moment(alarm.escalatedAt) }));
  return parts.join(' · ');
}

/** Since when, and how it stands, where there is something to say of that. */
export const describeStanding = (alarm: Alarm, format: Format, now: number): string =>
  [describeSpan(alarm, format, now), describeState(alarm, format, now)].filter((part) => part !== '').join(' · ');

/** What an alarm speaks for that is not one pump's; empty for all others. */
export function describeGroup({ group, returnedAt }: Alarm): string {
  if (group === null) return '';
  const { pumps, pads, standing } = group;
  return returnedAt === null ? t('alarm.group', { pumps, pads, standing }) : t('alarm.groupOver', { pumps, pads });
}

/** When the pad's next stop is, or that it has none; null for what is on several pads. */
export const describeNextStop = ({ nextStopOn, zone, pumpId }: Alarm, format: Format): string | null =>
  nextStopOn === null
    ? pumpId === null
      ? null
      : t('alarms.noRoute')
    : t('alarms.nextStop', { day: dayOfStop(nextStopOn, zone, format) });

/** The calendar day of a stop, as the reader writes days. */
export const dayOfStop = (day: string, zone: string, format: Format): string =>
  format.day(instantOfDay(day, zone), zone);

/** Noon of a calendar day at a pad: what writes that day in its zone. */
const instantOfDay = (day: string, zone: string): number => {
  const epochDay = Date.parse(`${day}T00:00:00Z`) / DAY_MS;
  return instantOf(zone, epochDay, 12 * 60) ?? Date.parse(`${day}T12:00:00Z`);
};

/** Whether somebody should still say that they have seen it; nobody is asked about a note. */
export const isWaiting = ({ state, alarmClass }: Pick<Alarm, 'state' | 'alarmClass'>): boolean =>
  alarmClass === 'alarm' && (state === 'unacknowledged' || state === 'returned' || state === 'latched');

const UNDO_MS = 5 * 60_000;

/** Whether this person may still take their acknowledgement back: their own, for five minutes. */
export const mayUndo = ({ acknowledgedAt, acknowledgedBy }: Alarm, name: string, now: number): boolean =>
  acknowledgedAt !== null && acknowledgedBy === name && now - acknowledgedAt < UNDO_MS;

const BEFORE_MS = 6 * 3_600_000;
const AFTER_NOW_MS = 3_600_000;

/** A day of the pump around the alarm's beginning: up to now while that is within it. In quarter hours, so that it stands still. */
export function evidenceWindow(
  { from }: Pick<Alarm, 'from'>,
  now: number,
): { readonly from: number; readonly until: number } {
  const step = (at: number) => Math.floor(at / 900_000) * 900_000;
  const until = Math.min(step(now) + AFTER_NOW_MS, step(from) + DAY_MS - BEFORE_MS);
  return { from: until - DAY_MS, until };
}

/** The acknowledged state an alarm takes at once on screen, before the server has answered. */
export const acknowledgedBy = (alarm: Alarm, name: string, now: number): Alarm => ({
  ...alarm,
  state: alarm.state === 'returned' ? 'normal' : 'acknowledged',
  acknowledgedAt: now,
  acknowledgedBy: name,
});
