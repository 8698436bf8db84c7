import type { Detector, Priority } from '#shared/domain/detectors/detector.ts';
import { DETECTOR_CLASSES } from '#shared/domain/detectors/detector-classes.data.ts';
import type { AreaKind, AreaSignal } from './area-signal.ts';
import type { AreaAlarm, AreaState, Member } from './area-state.ts';

/** Our own link is back once no more than this share of the devices it took is still silent. */
const LINK_BACK_SHARE = 0.2;
const RANK: Readonly<Record<Priority, number>> = { urgent: 3, soon: 2, note: 1 };

export type AreaCause = {
  readonly kind: AreaKind;
  readonly detector: Detector;
  readonly cause: string;
  readonly area: string;
  readonly from: number;
  readonly priority: Priority;
};

/** The alarms that stand for several pumps, and what is said of them. */
export type AreaLedger = {
  readonly raise: (cause: AreaCause, members: readonly Member[], at: number) => void;
  readonly join: (alarm: AreaAlarm, pumpId: string, priority: Priority, at: number) => void;
  /** A pump's own condition is over, for alarms of one of the kinds and, where given, one detector. */
  readonly leave: (pumpId: string, kinds: readonly AreaKind[], detector: Detector | undefined, at: number) => void;
  readonly take: () => AreaSignal[];
};

export function createAreaLedger(state: AreaState): AreaLedger {
  let signals: AreaSignal[] = [];
  const say = (type: AreaSignal['type'], alarm: AreaAlarm, at: number): void => {
    signals.push(signalOf(type, alarm, at));
  };
  return {
    raise: (cause, members, at) => {
      const pumpIds = members.map(({ pumpId }) => pumpId);
      const key = `${cause.kind}:${cause.area}:${cause.from}`;
      const alarm: AreaAlarm = { ...cause, key, raisedAt: at, pumpIds, open: [...pumpIds] };
      state.alarms.push(alarm);
      say('raised', alarm, at);
    },
    join: (alarm, pumpId, priority, at) => {
      const worse = RANK[priority] > RANK[alarm.priority];
      const known = alarm.pumpIds.includes(pumpId);
      if (!alarm.open.includes(pumpId)) alarm.open.push(pumpId);
      if (!known) alarm.pumpIds.push(pumpId);
      if (worse) alarm.priority = priority;
      if (worse || !known) say('changed', alarm, at);
    },
    leave: (pumpId, kinds, detector, at) => {
      for (const alarm of state.alarms) {
        const concerns = kinds.includes(alarm.kind) && (detector === undefined || alarm.detector === detector);
        if (concerns) alarm.open = alarm.open.filter((id) => id !== pumpId);
      }
      const over = state.alarms.filter(isOver);
      for (const alarm of over) say('cleared', alarm, at);
      state.alarms = state.alarms.filter((alarm) => !over.includes(alarm));
    },
    take: () => {
      const taken = signals;
      signals = [];
      return taken;
    },
  };
}

function isOver({ kind, open, pumpIds }: AreaAlarm): boolean {
  return open.length <= (kind === 'own-link' ? LINK_BACK_SHARE * pumpIds.length : 0);
}

function signalOf(type: AreaSignal['type'], alarm: AreaAlarm, at: number): AreaSignal {
  const { key, kind, detector, priority, cause, area, pumpIds, open, from } = alarm;
  return {
    type,
    key,
    kind,
    detector,
    alarmClass: DETECTOR_CLASSES[detector].alarmClass,
    priority,
    cause,
    area: area === '' ? null : area,
    pumpIds: [...pumpIds],
    from,
    at,
    evidence: { pumps: pumpIds.length, stillStanding: open.length },
  };
}
