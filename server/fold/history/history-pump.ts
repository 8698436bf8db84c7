import type { CommissionedPump } from '#server/db/commissioned-pumps.ts';
import { newId } from '#server/db/new-id.ts';
import { acknowledge } from '#shared/domain/alarms/acknowledge.ts';
import { type AlarmRecord, type AlarmStep, type AlarmTransition, isOpen } from '#shared/domain/alarms/alarm-record.ts';
import { applySignal } from '#shared/domain/alarms/apply-signal.ts';
import { ACKNOWLEDGE_WITHIN_MS } from '#shared/domain/alarms/escalate.ts';
import type { AlarmSignal } from '#shared/domain/detectors/detector.ts';
import { createPumpFold, type PumpFold } from '#shared/domain/fold/fold-pump.ts';
import type { PumpEvent } from '#shared/domain/fold/pump-event.ts';
import type { Run } from '#shared/domain/runs/run.ts';

/** An alarm of a history with every transition it made. */
export type HistoryAlarm = { readonly id: string; record: AlarmRecord; readonly transitions: AlarmTransition[] };

/** One pump while its history is folded. */
export type HistoryPump = {
  readonly pump: CommissionedPump;
  readonly fold: PumpFold;
  readonly runs: Map<number, Run>;
  readonly alarms: HistoryAlarm[];
  readonly connection: () => string | undefined;
  readonly heardAt: () => number | undefined;
  /** Takes an event; false for a reading that came late. */
  readonly take: (event: PumpEvent) => boolean;
  /** Gathers what is left, and lets somebody have seen the alarms that still stand but not the newest. */
  readonly finish: (now: number) => void;
};

/** How long after it was raised somebody of the company had seen an alarm of the history. */
const SEEN_AFTER_MS = 9 * 60_000;
const TAKE_EVERY_EVENTS = 200;

/**
 * A pump whose history is told at a cadence of its own. In a history every alarm that returned was seen by the
 * technician of its pad, as it would have been, and one that was explained away is over: what is left is what stands.
 */
export function createHistoryPump(
  pump: CommissionedPump,
  cadenceSeconds: number,
  seenBy: string | undefined,
): HistoryPump {
  const fold = createPumpFold({ ...pump.context, intervalSeconds: cadenceSeconds }, undefined, pump.rules);
  const runs = new Map<number, Run>();
  const alarms: HistoryAlarm[] = [];
  const open = new Map<string, HistoryAlarm>();
  let connection: string | undefined;
  let heardAt: number | undefined;
  let waiting = 0;

  const note = (alarm: HistoryAlarm, step: AlarmStep | undefined): void => {
    if (step?.transition === undefined) return;
    alarm.record = step.record;
    alarm.transitions.push(step.transition);
  };
  const see = (alarm: HistoryAlarm, at: number): void => {
    if (seenBy !== undefined && alarm.record.alarmClass === 'alarm')
      note(alarm, acknowledge(alarm.record, { by: seenBy, at, note: null }));
  };
  const takeSignal = (signal: AlarmSignal): void => {
    const alarm = open.get(signal.detector);
    if (alarm === undefined) {
      const step = applySignal(undefined, signal);
      if (step?.transition === undefined) return;
      const started = { id: newId(), record: startApart(step.record, alarms), transitions: [step.transition] };
      alarms.push(started);
      open.set(signal.detector, started);
      return;
    }
    if (signal.type === 'cleared') see(alarm, Math.min(alarm.record.raisedAt + SEEN_AFTER_MS, signal.at));
    note(alarm, applySignal(alarm.record, signal.type === 'cleared' ? { ...signal, evidence: {} } : signal));
    if (!isOpen(alarm.record)) open.delete(signal.detector);
  };
  const gather = (): void => {
    waiting = 0;
    const output = fold.take();
    for (const run of output.runs) runs.set(run.from, run);
    for (const signal of output.signals) takeSignal(signal);
  };

  return {
    pump,
    fold,
    runs,
    alarms,
    connection: () => connection,
    heardAt: () => heardAt,
    take: (event) => {
      if (event.kind === 'reading' && event.reading.at <= (fold.highWater() ?? Number.NEGATIVE_INFINITY)) return false;
      if (event.kind === 'status' && event.status.state === 'online') connection = event.status.connection;
      if (event.kind === 'reading' || event.kind === 'status') heardAt = event.receivedAt;
      fold.push(event);
      waiting += 1;
      if (waiting >= TAKE_EVERY_EVENTS) gather();
      return true;
    },
    finish: (now) => {
      gather();
      for (const alarm of open.values()) {
        const limit = ACKNOWLEDGE_WITHIN_MS[alarm.record.priority];
        if (limit !== undefined && now - alarm.record.raisedAt > limit)
          see(alarm, alarm.record.raisedAt + SEEN_AFTER_MS);
      }
    },
  };
}

/** Two alarms of one detector may name the same beginning; the second then began a moment later. */
function startApart(record: AlarmRecord, alarms: readonly HistoryAlarm[]): AlarmRecord {
  const starts = new Set(
    alarms.filter((alarm) => alarm.record.detector === record.detector).map((alarm) => alarm.record.from),
  );
  let from = record.from;
  while (starts.has(from)) from += 1;
  return from === record.from ? record : { ...record, from };
}
