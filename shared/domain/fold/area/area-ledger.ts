import { type Detector, isWorse, type Priority } from '#shared/domain/detectors/detector.ts';
import { DETECTOR_CLASSES } from '#shared/domain/detectors/detector-classes.data.ts';
import type { AreaKind, AreaSignal } from './area-signal.ts';
import { type AreaAlarm, type AreaState, isOfPump, listOpenPumps, type Member, openKey } from './area-state.ts';

/** Our own link is back once no more than this share of the devices it took is still silent. */
const LINK_BACK_SHARE = 0.2;

export type AreaCause = {
  readonly kind: AreaKind;
  readonly detector: Detector;
  readonly cause: string;
  readonly area: string;
  readonly from: number;
  readonly priority: Priority;
};

/** What of a pump an alarm speaks for. */
export type Condition = { readonly detector: Detector; readonly priority: Priority };

/** The alarms that stand for several pumps, and what is said of them. */
export type AreaLedger = {
  readonly raise: (cause: AreaCause, members: readonly Member[], at: number) => void;
  readonly join: (alarm: AreaAlarm, pumpId: string, condition: Condition, at: number) => void;
  /** A pump's own condition is over, for alarms of one of the kinds and, where given, one detector. */
  readonly leave: (pumpId: string, kinds: readonly AreaKind[], detector: Detector | undefined, at: number) => void;
  readonly take: () => AreaSignal[];
};

/**
 * Takes down what an area's rules say, as signals.
 *
 * @example createAreaLedger(state).raise(cause, members, at) // one signal for all of them
 */
export function createAreaLedger(state: AreaState): AreaLedger {
  let signals: AreaSignal[] = [];
  const say = (type: AreaSignal['type'], alarm: AreaAlarm, at: number): void => {
    signals.push(signalOf(type, alarm, state, at));
  };
  return {
    raise: (cause, members, at) => {
      const pumpIds = members.map(({ pumpId }) => pumpId);
      const key = `${cause.kind}:${cause.area}:${cause.from}`;
      const open = pumpIds.map((pumpId) => openKey(pumpId, cause.detector));
      const alarm: AreaAlarm = { ...cause, key, raisedAt: at, pumpIds, open };
      state.alarms.push(alarm);
      say('raised', alarm, at);
    },
    join: (alarm, pumpId, { detector, priority }, at) => {
      const worse = isWorse(priority, alarm.priority);
      const known = alarm.pumpIds.includes(pumpId);
      const own = openKey(pumpId, detector);
      if (!alarm.open.includes(own)) alarm.open.push(own);
      if (!known) alarm.pumpIds.push(pumpId);
      if (worse) alarm.priority = priority;
      if (worse || !known) say('changed', alarm, at);
    },
    leave: (pumpId, kinds, detector, at) => {
      for (const alarm of state.alarms) {
        if (!kinds.includes(alarm.kind)) continue;
        alarm.open = alarm.open.filter((own) =>
          detector === undefined ? !isOfPump(own, pumpId) : own !== openKey(pumpId, detector),
        );
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

function signalOf(type: AreaSignal['type'], alarm: AreaAlarm, { members }: AreaState, at: number): AreaSignal {
  const { key, kind, detector, priority, cause, area, pumpIds, from } = alarm;
  const pads = new Set(pumpIds.map((pumpId) => members.get(pumpId)?.padId ?? pumpId));
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
    evidence: {
      pumps: pumpIds.length,
      pads: pads.size,
      stillStanding: listOpenPumps(alarm).length,
      ...(area === '' ? {} : { area }),
    },
  };
}
