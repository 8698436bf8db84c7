import type { Actor } from '#server/context.ts';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import type { AlarmRow } from './alarm-row.ts';

/** Evidence as the contract has it: lists that may be changed by whoever gets them. */
const presentEvidence = (evidence: AlarmRow['record']['evidence']): Alarm['evidence'] =>
  Object.fromEntries(Object.entries(evidence).map(([name, value]) => [name, isList(value) ? [...value] : value]));

const isList = (value: unknown): value is readonly (number | string)[] => Array.isArray(value);

/** An alarm without what staff write to one another: as a homeowner reads it. */
export const hideStaffWords = (alarm: Alarm): Alarm => ({
  ...alarm,
  customerName: null,
  acknowledgedBy: null,
  acknowledgementNote: null,
  shelvedBy: null,
});

/** An alarm as the person may read it. */
export const presentAlarm = (row: AlarmRow, { role }: Pick<Actor, 'role'>): Alarm =>
  role === 'homeowner' ? hideStaffWords(presentForStaff(row)) : presentForStaff(row);

function presentForStaff(row: AlarmRow): Alarm {
  const { record } = row;
  return {
    id: row.id,
    pumpId: row.pumpId,
    padId: row.padId,
    padName: row.padName,
    pumpName: row.pumpName,
    customerName: row.customerName,
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
    acknowledgedBy: row.acknowledgedByName,
    acknowledgementNote: record.acknowledgementNote,
    escalatedAt: record.escalatedAt,
    shelvedUntil: record.shelf?.until ?? null,
    shelvedBy: row.shelvedByName,
    suppressed: record.suppressedBy !== null,
    outOfService: record.outOfService !== null,
    technicianName: row.technicianName,
    version: row.version,
  };
}
