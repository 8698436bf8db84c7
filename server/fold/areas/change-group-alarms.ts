import type pg from 'pg';
import { applySignal } from '#shared/domain/alarms/apply-signal.ts';
import type { AlarmSignal, Evidence } from '#shared/domain/detectors/detector.ts';
import type { AreaSignal } from '#shared/domain/fold/area/area-signal.ts';
import type { AlarmChange, OpenAlarm } from '../alarm-change.ts';
import { insertGroupAlarm, listPadNames, lockGroupAlarms, saveMembers } from './area-repository.ts';
import { type AreaOutcome, GROUPED_DETECTORS } from './fold-areas.ts';

/** Alarms that speak for several pumps after a commit: those that changed, and the one of each key. */
export type GroupAlarms = {
  readonly changes: readonly AlarmChange[];
  readonly groupOf: (key: string) => AlarmChange | undefined;
};

/** A mail and a screen name so many pads; the rest is on the alarm's own page. */
const NAMED_PADS = 12;

/** Takes what the area fold said into its alarms, and writes who belongs to each. */
export async function changeGroupAlarms(
  client: pg.PoolClient,
  outcome: AreaOutcome,
  now: number,
): Promise<GroupAlarms> {
  const { companyId, signals, touched, pumpIds, coveredBy } = outcome;
  const covering = pumpIds.flatMap((pumpId) => GROUPED_DETECTORS.flatMap((one) => coveredBy(pumpId, one) ?? []));
  const keys = new Set([...signals.map(({ key }) => key), ...touched.map(({ key }) => key), ...covering]);
  const open = await lockGroupAlarms(client, companyId, [...keys]);
  const changes = new Map([...open].map(([key, alarm]) => [key, changeOf(alarm)]));
  for (const signal of signals) await takeSignal(client, companyId, changes, signal);
  for (const { key, pumpIds: members, open: standing } of touched) {
    const change = changes.get(key);
    if (change === undefined) continue;
    await saveMembers(client, companyId, change.alarmId, { pumpIds: members, open: standing }, now);
    const evidence: Evidence = { ...change.record.evidence, stillStanding: standing.length };
    change.record = { ...change.record, evidence };
  }
  for (const { type, key, pumpIds: members } of signals) {
    const change = changes.get(key);
    if (type === 'cleared' && change !== undefined)
      await saveMembers(client, companyId, change.alarmId, { pumpIds: members, open: [] }, now);
  }
  const told = new Set([...signals.map(({ key }) => key), ...touched.map(({ key }) => key)]);
  return {
    changes: [...changes].filter(([key]) => told.has(key)).map(([, change]) => change),
    groupOf: (key) => changes.get(key),
  };
}

const changeOf = (alarm: OpenAlarm): AlarmChange => ({ ...alarm, isNew: false, isBacklog: false, transitions: [] });

async function takeSignal(
  client: pg.PoolClient,
  companyId: string,
  changes: Map<string, AlarmChange>,
  signal: AreaSignal,
): Promise<void> {
  const known = changes.get(signal.key);
  const step = applySignal(known?.record, await toAlarmSignal(client, signal, known?.record.evidence));
  if (step?.transition === undefined) return;
  if (known !== undefined) {
    known.record = step.record;
    known.transitions.push(step.transition);
    return;
  }
  const { record, transition } = step;
  const alarmId = await insertGroupAlarm(client, { companyId, record }, signal);
  const transitions = [transition];
  // Its row is there: from here on it is saved as one that was.
  changes.set(signal.key, {
    ...{ alarmId, companyId, pumpId: null, padId: null, isNew: false, isBacklog: false },
    ...{ record, transitions },
  });
}

async function toAlarmSignal(
  client: pg.PoolClient,
  signal: AreaSignal,
  before: Evidence | undefined,
): Promise<AlarmSignal> {
  const { type, detector, alarmClass, priority, cause, from, at, pumpIds } = signal;
  if (type === 'cleared') return { type, detector, at, evidence: { ...before, ...signal.evidence } };
  const { names, count } = await listPadNames(client, pumpIds, NAMED_PADS);
  const more = count > names.length ? [`${count - names.length} more`] : [];
  const evidence = { ...signal.evidence, padNames: [...names, ...more] };
  return { type, detector, alarmClass, priority, cause, from, at, evidence };
}
