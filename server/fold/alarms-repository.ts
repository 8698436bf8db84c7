import type pg from 'pg';
import { newId } from '#server/db/new-id.ts';
import type { AlarmTransition } from '#shared/domain/alarms/alarm-record.ts';
import { CURED_WITHIN_MS } from '#shared/domain/alarms/apply-to-done.ts';
import { readRecord } from '#shared/domain/alarms/read-record.ts';
import type { AlarmChange, OpenAlarm } from './alarm-change.ts';

type Database = Pick<pg.ClientBase, 'query'>;

/** An alarm's columns that make an OpenAlarm of it. */
export type AlarmRow = {
  readonly id: string;
  readonly company_id: string;
  readonly pump_id: string | null;
  readonly pad_id: string | null;
  readonly record: unknown;
};

export const toOpenAlarm = (row: AlarmRow): OpenAlarm => ({
  alarmId: row.id,
  companyId: row.company_id,
  pumpId: row.pump_id,
  padId: row.pad_id,
  record: readRecord(row.record),
});

/**
 * The open alarms of some pumps, and the notes that were worked off while their condition holds, locked: a person who
 * acknowledges one meanwhile waits, or we do.
 */
export async function lockOpenAlarms(database: Database, pumpIds: readonly string[]): Promise<OpenAlarm[]> {
  const { rows } = await database.query<AlarmRow>(
    `select id, company_id, pump_id, pad_id, record from alarms
     where pump_id = any($1::uuid[]) and (state <> 'normal' or done_at is not null and returned_at is null)
     order by id for update`,
    [pumpIds],
  );
  return rows.map(toOpenAlarm);
}

/** Alarms that time alone may change (escalation, re-alarm, the end of a shelf, a cure that did not come), as they stand. */
export async function listWaitingAlarms(database: Database, now: number): Promise<OpenAlarm[]> {
  const { rows } = await database.query<AlarmRow>(
    `select id, company_id, pump_id, pad_id, record from alarms
     where state <> 'normal' and (alarm_class = 'alarm' and priority <> 'note' or shelved_until is not null)
     union all select id, company_id, pump_id, pad_id, record from alarms
     where done_at <= $1 and returned_at is null and state = 'normal'`,
    [new Date(now - CURED_WITHIN_MS)],
  );
  return rows.map(toOpenAlarm);
}

/** These alarms, locked. */
export async function lockAlarms(database: Database, alarmIds: readonly string[]): Promise<OpenAlarm[]> {
  const { rows } = await database.query<AlarmRow>(
    `select id, company_id, pump_id, pad_id, record from alarms
     where id = any($1::uuid[]) and (state <> 'normal' or done_at is not null and returned_at is null)
     order by id for update`,
    [alarmIds],
  );
  return rows.map(toOpenAlarm);
}

/** When the newest alarm of each pump and detector began, ms. */
export async function listNewestStarts(database: Database, pumpIds: readonly string[]): Promise<Map<string, number>> {
  const { rows } = await database.query<{ key: string; from_at: number }>(
    `select pump_id || ' ' || detector as key, max(date_part('epoch', from_at) * 1000) as from_at
     from alarms where pump_id = any($1::uuid[]) group by pump_id, detector`,
    [pumpIds],
  );
  return new Map(rows.map(({ key, from_at }) => [key, Math.round(from_at)]));
}

const COLUMNS = `alarm_class, priority, state, cause, evidence, from_at, raised_at, returned_at, acknowledged_at,
  acknowledged_by, acknowledgement_note, escalated_at, shelved_until, shelved_by, shelved_reason, suppressed,
  out_of_service, latched, assigned_to, done_at, done_cause, count, record`;

const VALUES = `g.alarm_class, g.priority, g.state, g.cause, g.evidence, to_timestamp(g.from_at / 1000),
  to_timestamp(g.raised_at / 1000), to_timestamp(g.returned_at / 1000), to_timestamp(g.acknowledged_at / 1000),
  g.acknowledged_by, g.acknowledgement_note, to_timestamp(g.escalated_at / 1000), to_timestamp(g.shelved_until / 1000),
  g.shelved_by, g.shelved_reason, g.suppressed, g.out_of_service, g.latched, g.assigned_to, to_timestamp(g.done_at / 1000),
  g.done_cause, g.count, g.record`;

const GIVEN = `json_to_recordset($1::json) as g(id uuid, company_id uuid, pump_id uuid, pad_id uuid, detector text, steps int,
  alarm_class text, priority text, state text, cause text, evidence jsonb, from_at float8, raised_at float8,
  returned_at float8, acknowledged_at float8, acknowledged_by uuid, acknowledgement_note text, escalated_at float8,
  shelved_until float8, shelved_by uuid, shelved_reason text, suppressed boolean, out_of_service boolean,
  latched boolean, assigned_to uuid, done_at float8, done_cause text, count int, record jsonb)`;

const INSERT = `insert into alarms (id, company_id, pump_id, pad_id, detector, version, ${COLUMNS})
  select g.id, g.company_id, g.pump_id, g.pad_id, g.detector, greatest(g.steps, 1), ${VALUES} from ${GIVEN}`;

const UPDATE = `update alarms a set (version, ${COLUMNS}) = (select a.version + g.steps, ${VALUES}) from ${GIVEN} where a.id = g.id`;

const TRANSITIONS = `insert into alarm_transitions (id, company_id, alarm_id, at, kind, by_user_id, note, priority, cause, evidence)
  select t.id, t.company_id, t.alarm_id, to_timestamp(t.at / 1000), t.kind, t.by_user_id, t.note, t.priority, t.cause, t.evidence
  from json_to_recordset($1::json) as t(id uuid, company_id uuid, alarm_id uuid, at float8, kind text, by_user_id uuid,
    note text, priority text, cause text, evidence jsonb)`;

/** Stores alarms as they stand after their changes, with every transition. Alarms that changed must be locked. */
export async function saveAlarmChanges(database: Database, changes: readonly AlarmChange[]): Promise<void> {
  const added = changes.filter(({ isNew }) => isNew);
  const changed = changes.filter(({ isNew }) => !isNew);
  if (added.length > 0) await database.query(INSERT, [JSON.stringify(added.map(toColumns))]);
  if (changed.length > 0) await database.query(UPDATE, [JSON.stringify(changed.map(toColumns))]);
  const transitions = changes.flatMap((change) => change.transitions.map((one) => toTransition(change, one)));
  if (transitions.length > 0) await database.query(TRANSITIONS, [JSON.stringify(transitions)]);
}

function toColumns({ alarmId, companyId, pumpId, padId, record, transitions }: AlarmChange) {
  return {
    id: alarmId,
    company_id: companyId,
    pump_id: pumpId,
    pad_id: padId,
    detector: record.detector,
    steps: transitions.length,
    alarm_class: record.alarmClass,
    priority: record.priority,
    state: record.state,
    cause: record.cause,
    evidence: record.evidence,
    from_at: record.from,
    raised_at: record.raisedAt,
    returned_at: record.returnedAt,
    acknowledged_at: record.acknowledgedAt,
    acknowledged_by: record.acknowledgedBy,
    acknowledgement_note: record.acknowledgementNote,
    escalated_at: record.escalatedAt,
    shelved_until: record.shelf?.until,
    shelved_by: record.shelf?.by,
    shelved_reason: record.shelf?.reason,
    suppressed: record.suppressedBy !== null,
    out_of_service: record.outOfService !== null,
    latched: record.state === 'latched',
    assigned_to: record.assignment?.to,
    done_at: record.done?.at,
    done_cause: record.done?.cause,
    count: record.count,
    record,
  };
}

function toTransition({ alarmId, companyId }: AlarmChange, transition: AlarmTransition) {
  return {
    id: newId(),
    company_id: companyId,
    alarm_id: alarmId,
    at: transition.at,
    kind: transition.kind,
    by_user_id: transition.by,
    note: transition.note,
    priority: transition.priority,
    cause: transition.cause,
    evidence: transition.evidence,
  };
}
