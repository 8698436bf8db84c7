import { newId } from '#server/db/new-id.ts';
import { type AlarmRecord, isOpen, isWatched } from '#shared/domain/alarms/alarm-record.ts';
import { applySignal } from '#shared/domain/alarms/apply-signal.ts';
import type { AlarmSignal } from '#shared/domain/detectors/detector.ts';
import { type AlarmChange, alarmKey, type OpenAlarm } from './alarm-change.ts';

/** A pump's signals of one commit, in order. */
export type PumpSignals = {
  readonly companyId: string;
  readonly pumpId: string;
  readonly padId: string;
  readonly signals: readonly AlarmSignal[];
};

export type AlarmsBefore = {
  readonly open: readonly OpenAlarm[];
  /** When the newest alarm of each key began, ms. */
  readonly newestStarts: ReadonlyMap<string, number>;
};

/** A signal that is older than this when it is folded comes from a backlog, ms. */
export const BACKLOG_AFTER_MS = 2 * 60_000;

/**
 * Takes the signals of some pumps into their alarms; answers those that changed. An alarm that a backlog raises and
 * clears in one go is history at once: by the time anybody could have been called there was nothing left to do.
 */
export function applySignals(pumps: readonly PumpSignals[], before: AlarmsBefore, now: number): AlarmChange[] {
  // A note that was worked off stands back behind one that is open.
  const known = before.open.toSorted((a, b) => Number(isOpen(a.record)) - Number(isOpen(b.record)));
  const current = new Map(known.map((alarm) => [alarmKey(alarm.pumpId, alarm.record.detector), changeOf(alarm)]));
  const changed = new Set<AlarmChange>();
  for (const pump of pumps) {
    for (const signal of pump.signals) {
      const key = alarmKey(pump.pumpId, signal.detector);
      const known = current.get(key);
      const step = applySignal(known?.record, signal);
      if (step?.transition === undefined) continue;
      const isGoingOn = known !== undefined && isWatched(known.record);
      const change = isGoingOn ? known : addChange(pump, step.record, now - signal.at > BACKLOG_AFTER_MS);
      change.record = isGoingOn ? step.record : startApart(step.record, before.newestStarts.get(key));
      change.transitions.push(step.transition);
      current.set(key, change);
      changed.add(change);
    }
  }
  for (const change of changed) settleBacklog(change);
  return [...changed];
}

function changeOf(alarm: OpenAlarm): AlarmChange {
  return { ...alarm, isNew: false, isBacklog: false, transitions: [] };
}

function addChange({ companyId, pumpId, padId }: PumpSignals, record: AlarmRecord, isBacklog: boolean): AlarmChange {
  return { alarmId: newId(), companyId, pumpId, padId, isNew: true, record, transitions: [], isBacklog };
}

/** No two alarms of a pump and detector begin at the same instant: their beginning names them. */
function startApart(record: AlarmRecord, newestStart: number | undefined): AlarmRecord {
  return record.from === newestStart ? { ...record, from: record.from + 1 } : record;
}

function settleBacklog(change: AlarmChange): void {
  const { record } = change;
  if (!change.isNew || !change.isBacklog || record.active || record.state !== 'returned') return;
  change.record = { ...record, state: 'normal' };
}
