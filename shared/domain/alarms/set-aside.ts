import { type AlarmRecord, type AlarmStep, makeStep, noStep } from './alarm-record.ts';

/** The longest a shelf may last: a week (common practice); longer is out of service. */
export const LONGEST_SHELF_MS = 7 * 86_400_000;

export type SetAside = { readonly by: string; readonly at: number; readonly reason: string };

/**
 * Shelves an alarm until an instant: it stays, but calls nobody. Undefined without a reason, for a time that has
 * passed, or for more than a week. A shelf ends by itself (`passTime`).
 *
 * @example shelve(record, { by, at, until: at + 3_600_000, reason: 'part ordered' })?.record.shelf?.until // an hour later
 */
export function shelve(record: AlarmRecord, act: SetAside & { readonly until: number }): AlarmStep | undefined {
  const reason = act.reason.trim();
  if (reason === '' || !(act.until > act.at) || act.until - act.at > LONGEST_SHELF_MS) return undefined;
  const shelf = { by: act.by, reason, at: act.at, until: act.until };
  return makeStep({ ...record, shelf }, 'shelved', act.at, act.by, reason);
}

/**
 * Takes an alarm from its shelf; it waits for an acknowledgement from now on.
 *
 * @example endShelf(shelved, { by, at }).record.shelf // null
 */
export function endShelf(record: AlarmRecord, act: { readonly by: string; readonly at: number }): AlarmStep {
  if (record.shelf === null) return noStep(record);
  return makeStep({ ...record, shelf: null, waitingSince: act.at }, 'shelf-ended', act.at, act.by);
}

/**
 * Suppresses an alarm by design: another alarm or the pad's state explains it.
 *
 * @example suppress(record, { at, explainedBy: 'pad-state:drained' }).record.suppressedBy // 'pad-state:drained'
 */
export function suppress(record: AlarmRecord, act: { readonly at: number; readonly explainedBy: string }): AlarmStep {
  if (record.suppressedBy === act.explainedBy) return noStep(record);
  return makeStep({ ...record, suppressedBy: act.explainedBy }, 'suppressed', act.at, null, act.explainedBy);
}

/**
 * Ends a suppression by design.
 *
 * @example endSuppression(suppressed, at).record.suppressedBy // null
 */
export function endSuppression(record: AlarmRecord, at: number): AlarmStep {
  if (record.suppressedBy === null) return noStep(record);
  return makeStep({ ...record, suppressedBy: null, waitingSince: at }, 'suppression-ended', at);
}

/**
 * Takes an alarm out of service until a person returns it; undefined without a reason.
 *
 * @example takeOutOfService(record, { by, at, reason: ' ' }) // undefined: it needs a reason
 */
export function takeOutOfService(record: AlarmRecord, act: SetAside): AlarmStep | undefined {
  const reason = act.reason.trim();
  if (reason === '') return undefined;
  if (record.outOfService !== null) return noStep(record);
  const outOfService = { by: act.by, reason, at: act.at };
  return makeStep({ ...record, outOfService }, 'out-of-service', act.at, act.by, reason);
}

/**
 * Returns an alarm to service; it waits for an acknowledgement from now on.
 *
 * @example returnToService(outOfService, { by, at }).record.outOfService // null
 */
export function returnToService(record: AlarmRecord, act: { readonly by: string; readonly at: number }): AlarmStep {
  if (record.outOfService === null) return noStep(record);
  return makeStep({ ...record, outOfService: null, waitingSince: act.at }, 'returned-to-service', act.at, act.by);
}
