import type { Actor } from '#server/context.ts';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import type { AlarmRow } from './alarm-row.ts';

/** Evidence as the contract has it: lists that may be changed by whoever gets them. */
const presentEvidence = (evidence: AlarmRow['record']['evidence']): Alarm['evidence'] =>
  Object.fromEntries(Object.entries(evidence).map(([name, value]) => [name, isList(value) ? [...value] : value]));

const isList = (value: unknown): value is readonly (number | string)[] => Array.isArray(value);

/** What staff write to one another is not for the homeowner. */
function presentPeople(row: AlarmRow, actor: Pick<Actor, 'role'>) {
  const isStaff = actor.role !== 'homeowner';
  return {
    customerName: isStaff ? row.customerName : null,
    acknowledgedBy: isStaff ? row.acknowledgedByName : null,
    acknowledgementNote: isStaff ? row.record.acknowledgementNote : null,
    shelvedBy: isStaff ? row.shelvedByName : null,
    technicianName: row.technicianName,
  };
}

/** An alarm as the person may read it. */
export function presentAlarm(row: AlarmRow, actor: Pick<Actor, 'role'>): Alarm {
  const { record } = row;
  return {
    id: row.id,
    pumpId: row.pumpId,
    padId: row.padId,
    padName: row.padName,
    pumpName: row.pumpName,
    area: row.area,
    zone: row.zone,
    detector: record.detector,
    alarmClass: record.alarmClass,
    priority: record.priority,
    state: record.state,
    cause: record.cause,
    evidence: presentEvidence(record.evidence),
    from: record.from,
    raisedAt: record.raisedAt,
    returnedAt: record.returnedAt,
    count: record.count,
    acknowledgedAt: record.acknowledgedAt,
    escalatedAt: record.escalatedAt,
    shelvedUntil: record.shelf?.until ?? null,
    suppressed: record.suppressedBy !== null,
    outOfService: record.outOfService !== null,
    version: row.version,
    ...presentPeople(row, actor),
  };
}
