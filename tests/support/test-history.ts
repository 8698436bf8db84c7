import { sql } from 'drizzle-orm';
import type pg from 'pg';
import { newId } from '#server/db/new-id.ts';
import { alarmTransitions } from '#server/db/schema/alarm-transitions.ts';
import { type AlarmState, alarms } from '#server/db/schema/alarms.ts';
import { deviceEvents } from '#server/db/schema/device-events.ts';
import { outboxMails } from '#server/db/schema/outbox-mails.ts';
import { pumpStates } from '#server/db/schema/pump-states.ts';
import { pumps } from '#server/db/schema/pumps.ts';
import { readings } from '#server/db/schema/readings.ts';
import { refusedMessages } from '#server/db/schema/refused-messages.ts';
import { runs } from '#server/db/schema/runs.ts';
import { asMachine, type Transaction } from '#server/db/transaction.ts';
import type { AlarmRecord } from '#shared/domain/alarms/alarm-record.ts';
import { applySignal } from '#shared/domain/alarms/apply-signal.ts';
import type { AlarmClass, Detector, Priority } from '#shared/domain/detectors/detector.ts';
import type { PumpNow } from '#shared/domain/fold/fold-output.ts';

type PumpKey = { companyId: string; padId: string; number: number };

async function getPump(db: Transaction, pumpId: string): Promise<PumpKey> {
  const [pump] = await db.select().from(pumps).where(sql`${pumps.id} = ${pumpId}`);
  if (!pump) throw new Error(`no pump ${pumpId}`);
  return pump;
}

export type TestAlarm = {
  readonly from?: Date;
  readonly detector?: Detector;
  readonly priority?: Priority;
  readonly state?: AlarmState;
  readonly alarmClass?: AlarmClass;
};

/** The record of an alarm as its state machine raises it, put into a state. */
function recordOf({
  from = new Date(),
  detector = 'failed-prime',
  priority = 'urgent',
  state,
  alarmClass = 'alarm',
}: TestAlarm): AlarmRecord {
  const [at, cause, evidence] = [from.getTime(), 'air-leak', { primeWatts: 310 }];
  const raised = { type: 'raised', detector, alarmClass, priority, from: at, at, cause, evidence } as const;
  const record = applySignal(undefined, raised)?.record;
  if (record === undefined) throw new Error('a raised signal raises an alarm');
  return state === undefined ? record : { ...record, state, active: state !== 'normal' && state !== 'returned' };
}

/** Writes an alarm with its first transition and a mail about it; its id. */
export function addAlarm(machine: pg.Pool, pumpId: string, alarm: TestAlarm = {}): Promise<string> {
  const record = recordOf(alarm);
  const { detector, priority, state, alarmClass, cause, evidence } = record;
  const from = new Date(record.from);
  return asMachine(machine, async (db) => {
    const { companyId, padId } = await getPump(db, pumpId);
    const id = newId();
    const key = { id, companyId, pumpId, padId, detector };
    const times = { fromAt: from, raisedAt: from };
    await db.insert(alarms).values({ ...key, ...times, alarmClass, priority, state, cause, evidence, record });
    const transition = { at: from, kind: 'raised', priority, cause };
    await db.insert(alarmTransitions).values({ id: newId(), companyId, alarmId: id, ...transition });
    await db.insert(outboxMails).values({
      id: newId(),
      companyId,
      alarmId: id,
      transition: 'raised:1',
      toAddress: 'technician@company.example',
      subject: 'It did not prime',
      text: 'text',
      html: '<p>html</p>',
      messageId: `<${id}@company.example>`,
      dueAt: from,
    });
    return id;
  });
}

export const nowOf = (at: Date, more: Partial<PumpNow> = {}): PumpNow => ({
  at: at.getTime(),
  rpm: 1700,
  watts: 410,
  closedInputs: 0,
  activeInput: 0,
  source: 'program',
  expectedSource: 'program',
  expectedRpm: 1700,
  because: { kind: 'program', entry: 0, fromMinute: 480, toMinute: 1080 },
  until: undefined,
  lockedBy: undefined,
  primed: true,
  flow: undefined,
  ...more,
});

/** Writes the pump's present state. */
export function setState(machine: pg.Pool, pumpId: string, at: Date, now: Partial<PumpNow> = {}): Promise<void> {
  return asMachine(machine, async (db) => {
    const { companyId, number } = await getPump(db, pumpId);
    const state = { now: nowOf(at, now), heardAt: at, highWater: at };
    await db
      .insert(pumpStates)
      .values({ pumpId, companyId, pumpNumber: number, ...state })
      .onConflictDoUpdate({ target: pumpStates.pumpId, set: state });
  });
}

/** Writes a run of one hour from `from`, with a reading a minute. */
export function addHour(machine: pg.Pool, pumpId: string, from: Date, rpm = 1700): Promise<void> {
  return asMachine(machine, async (db) => {
    const { companyId, number: pumpNumber } = await getPump(db, pumpId);
    const minutes = Array.from({ length: 60 }, (_, index) => new Date(from.getTime() + index * 60_000));
    await db
      .insert(readings)
      .values(
        minutes.map((at) => ({ at, receivedAt: at, pumpNumber, rpm, watts: 410, closedInputs: 0, activeInput: 0 })),
      );
    await db.insert(runs).values({
      pumpId,
      companyId,
      fromAt: from,
      toAt: new Date(from.getTime() + 3_600_000),
      coveredMs: 3_540_000,
      wattHours: 410,
      expectedRpm: rpm,
      meanRpm: rpm,
      meanWatts: 410,
      gallons: 1800,
      closedInputs: 0,
      activeInput: 0,
      source: 'program',
      expectedSource: 'program',
    });
  });
}

/** Writes one of everything else a pump's device leaves behind. */
export function addDeviceTraces(machine: pg.Pool, pumpId: string, deviceId: string, receivedAt: Date): Promise<void> {
  return asMachine(machine, async (db) => {
    const { companyId } = await getPump(db, pumpId);
    await db.insert(deviceEvents).values({ companyId, deviceId, pumpId, kind: 'status', receivedAt, body: {} });
    const refusal = { reason: 'w-negative', detail: 'reading 1 of 1', sample: '{"w":-3}' };
    await db.insert(refusedMessages).values({ companyId, deviceId, receivedAt, ...refusal });
  });
}
