import { type AlarmRecord, type AlarmStep, isOpen, makeStep, noStep } from './alarm-record.ts';

type Act = { readonly by: string; readonly at: number };

/**
 * Gives an open alarm to a technician, who is then told of it instead of the pad's own; undefined for history. Giving it
 * to whoever has it changes nothing. `name` is theirs, for the history.
 *
 * @example assign(record, { by: managerId, at, to: technicianId, name: 'Joss Aldane' })?.record.assignment?.told // false
 */
export function assign(
  record: AlarmRecord,
  act: Act & { readonly to: string; readonly name: string },
): AlarmStep | undefined {
  if (!isOpen(record)) return undefined;
  if (record.assignment?.to === act.to) return noStep(record);
  const assignment = { to: act.to, by: act.by, at: act.at, told: false };
  return makeStep({ ...record, assignment }, 'assigned', act.at, act.by, act.name);
}

/**
 * Gives an alarm back to the technician of its pad.
 *
 * @example endAssignment(given, { by: managerId, at }).record.assignment // null
 */
export function endAssignment(record: AlarmRecord, act: Act): AlarmStep {
  if (record.assignment === null) return noStep(record);
  return makeStep({ ...record, assignment: null }, 'unassigned', act.at, act.by);
}

/**
 * The alarm once its new technician's mail has been written, or need not be; undefined where that is so already.
 *
 * @example markTold(given)?.assignment?.told // true
 */
export function markTold(record: AlarmRecord): AlarmRecord | undefined {
  if (record.assignment === null || record.assignment.told) return undefined;
  return { ...record, assignment: { ...record.assignment, told: true } };
}
