import type { Alarm } from '#shared/contract/http/alarms.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/page-words.ts';

/** Since when it stands, or from when to when it stood, in the pad's time. */
export function describeSpan({ from, returnedAt, zone, count }: Alarm, format: Format, now: number): string {
  const span =
    returnedAt === null
      ? t('alarm.since', { time: format.moment(from, zone, now), span: format.span(now - from) })
      : t('alarm.lasted', { from: format.moment(from, zone, now), to: format.moment(returnedAt, zone, now) });
  return count > 1 ? `${span} · ${t('alarm.times', { count })}` : span;
}

/** Who has seen it and what stands over it, in the order in which it matters. */
export function describeState(alarm: Alarm, format: Format, now: number): string {
  const moment = (at: number) => format.moment(at, alarm.zone, now);
  const parts: string[] = [];
  if (alarm.outOfService) parts.push(t('alarm.outOfService'));
  if (alarm.suppressed) parts.push(t('alarm.suppressed'));
  if (alarm.shelvedUntil !== null) {
    parts.push(t('alarm.shelved', { time: moment(alarm.shelvedUntil), name: alarm.shelvedBy ?? '–' }));
  }
  if (alarm.state === 'returned') parts.push(t('alarm.state.returned', { time: moment(alarm.returnedAt ?? now) }));
  else if (alarm.acknowledgedAt !== null && alarm.state !== 'latched') {
    parts.push(
      t('alarm.state.acknowledged', { name: alarm.acknowledgedBy ?? '–', time: moment(alarm.acknowledgedAt) }),
    );
  } else if (alarm.state === 'latched') parts.push(t('alarm.state.latched'));
  else if (alarm.state === 'unacknowledged') parts.push(t('alarm.state.unacknowledged'));
  if (alarm.state === 'normal') parts.push(t('alarm.state.normal'));
  if (alarm.escalatedAt !== null) parts.push(t('alarm.escalated', { time: moment(alarm.escalatedAt) }));
  return parts.join(' · ');
}

/** Whether somebody should still say that they have seen it. */
export const isWaiting = ({ state }: Alarm): boolean =>
  state === 'unacknowledged' || state === 'returned' || state === 'latched';

const UNDO_MS = 5 * 60_000;

/** Whether this person may still take their acknowledgement back: their own, for five minutes. */
export const mayUndo = ({ acknowledgedAt, acknowledgedBy }: Alarm, name: string, now: number): boolean =>
  acknowledgedAt !== null && acknowledgedBy === name && now - acknowledgedAt < UNDO_MS;

const DAY_MS = 86_400_000;
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
