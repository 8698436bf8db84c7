import type { Actor } from '#server/context.ts';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import type { AlarmRecord } from '#shared/domain/alarms/alarm-record.ts';
import { partsOf } from '#shared/domain/alarms/explanation.ts';
import { readRecord } from '#shared/domain/alarms/read-record.ts';
import { nextWeekday } from '#shared/domain/time/next-weekday.ts';
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
  shelvedReason: null,
  outOfServiceSince: alarm.outOfServiceSince === null ? null : { ...alarm.outOfServiceSince, by: null, reason: null },
  answer: alarm.answer === null ? null : { ...alarm.answer, by: null, note: null },
  done: alarm.done === null ? null : { ...alarm.done, by: null, found: null },
  assignedTo: null,
});

/** An alarm as the person may read it. */
export function presentAlarm(row: AlarmRow, { role }: Pick<Actor, 'role'>, now: number): Alarm {
  const alarm = presentForStaff(row, now);
  return role === 'homeowner' ? hideStaffWords(alarm) : alarm;
}

function presentForStaff(row: AlarmRow, now: number): Alarm {
  const record = readRecord(row.record);
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
    ...presentSetAside(record, row),
    ...presentAnswers(record, row),
    assignedTo:
      record.assignment === null || row.assigneeName === null
        ? null
        : { id: record.assignment.to, name: row.assigneeName },
    technicianName: row.assigneeName ?? row.technicianName,
    nextStopOn: row.stopWeekday === null ? null : (nextWeekday(row.zone, row.stopWeekday, now) ?? null),
    group: presentGroup(row),
    coveredBy: row.coveredBy,
    version: row.version,
  };
}

function presentGroup({ groupKind, groupArea, record }: AlarmRow): Alarm['group'] {
  if (groupKind === null) return null;
  const numberOf = (name: string): number => {
    const value = record.evidence[name];
    return typeof value === 'number' ? value : 0;
  };
  const counts = { pumps: numberOf('pumps'), pads: numberOf('pads'), standing: numberOf('stillStanding') };
  return { kind: groupKind, area: groupArea, ...counts };
}

function presentSetAside({ shelf, suppressedBy, outOfService }: AlarmRecord, row: AlarmRow) {
  const explanation = partsOf(suppressedBy);
  return {
    shelvedUntil: shelf?.until ?? null,
    shelvedBy: row.shelvedByName,
    shelvedReason: shelf?.reason ?? null,
    suppressed: suppressedBy !== null,
    suppressedBy: explanation === undefined ? null : { padState: null, detector: null, ...explanation },
    outOfService: outOfService !== null,
    outOfServiceSince:
      outOfService === null ? null : { at: outOfService.at, by: row.outOfServiceByName, reason: outOfService.reason },
  };
}

const presentAnswers = ({ answer, done }: AlarmRecord, row: AlarmRow) => ({
  answer: answer === null ? null : { at: answer.at, by: row.answeredByName, note: answer.note },
  done: done === null ? null : { at: done.at, by: row.doneByName, found: done.found, cause: done.cause },
});
