import { type AlarmRecord, isOpen } from '#shared/domain/alarms/alarm-record.ts';
import { endSuppression, suppress } from '#shared/domain/alarms/set-aside.ts';
import type { AlarmChange, OpenAlarm } from '../alarm-change.ts';
import type { Cover } from './area-repository.ts';
import { type AreaOutcome, GROUPED_DETECTORS } from './fold-areas.ts';

const ALARM = 'alarm:';

/** The pumps' own alarms after a commit, and which of them another alarm speaks for from now on. */
export type CoveredAlarms = { readonly changes: readonly AlarmChange[]; readonly covers: readonly Cover[] };

/**
 * Suppresses by design the pumps' own alarms for which one alarm speaks, and lets those speak again that are left over
 * when it has ended. `changes` are those of the same commit, `open` all that were open before it.
 */
export function coverAlarms(
  changes: readonly AlarmChange[],
  open: readonly OpenAlarm[],
  { coveredBy, isSilent, companyId }: AreaOutcome,
  groupOf: (key: string) => AlarmChange | undefined,
  now: number,
): CoveredAlarms {
  const all = new Map<string, AlarmChange>(open.map((alarm) => [alarm.alarmId, asChange(alarm)]));
  for (const change of changes) all.set(change.alarmId, change);
  const covers: Cover[] = [];
  const changed = new Set(changes);
  for (const change of all.values()) {
    const { pumpId, record } = change;
    if (pumpId === null || change.companyId !== companyId || !isOpen(record) || !record.active) continue;
    if (!GROUPED_DETECTORS.includes(record.detector)) continue;
    const key = coveredBy(pumpId, record.detector);
    const group = key === undefined ? undefined : groupOf(key);
    const isLeft = record.detector !== 'silent' || isSilent(pumpId);
    const step =
      group !== undefined
        ? suppress(withCause(record, group.record.cause), { at: now, explainedBy: `${ALARM}${group.alarmId}` })
        : isLeft && record.suppressedBy?.startsWith(ALARM) === true
          ? endSuppression(record, now)
          : undefined;
    if (step?.transition === undefined) continue;
    change.record = step.record;
    change.transitions.push(step.transition);
    changed.add(change);
    covers.push({ alarmId: change.alarmId, coveredBy: group?.alarmId ?? null });
  }
  return { changes: [...changed], covers };
}

/** Alone nobody can tell why a device is silent; its neighbours do. */
const withCause = (record: AlarmRecord, cause: string): AlarmRecord =>
  record.cause === 'unknown' ? { ...record, cause } : record;

const asChange = (alarm: OpenAlarm): AlarmChange => ({ ...alarm, isNew: false, isBacklog: false, transitions: [] });
