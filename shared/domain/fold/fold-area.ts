import type { AlarmSignal, Detector, Priority } from '../detectors/detector.ts';
import type { Json } from '../detectors/plain-state.ts';
import { type AreaLedger, createAreaLedger } from './area/area-ledger.ts';
import type { AreaSignal } from './area/area-signal.ts';
import {
  AREA_KINDS,
  type AreaAlarm,
  type AreaState,
  listOpenPumps,
  type Member,
  openKey,
  restoreAreaState,
  saveAreaState,
} from './area/area-state.ts';
import { findFallList, listFallenTogether } from './area/load-fall.ts';
import { droppedAt, type Listening, listOwnLinkDrops } from './area/own-link.ts';

/** Where a pump stands among the company's others. */
export type AreaPump = { readonly pumpId: string; readonly padId: string; readonly area?: string | undefined };

export type AreaStanding = {
  readonly key: string;
  readonly pumpIds: readonly string[];
  readonly open: readonly string[];
};

/** A second fold, over the pumps of one company: what befalls several of them at once is one alarm. */
export type AreaFold = {
  /**
   * How a pump's device is heard now: `silentSince` = its last word once it is silent (see PumpFold.silentSince),
   * undefined while it is heard; `lostAt` = when its connection dropped (see PumpFold.lostAt), ms. Saying it again
   * changes nothing.
   */
  hear(pump: AreaPump, silentSince: number | undefined, at: number, lostAt?: number): void;
  /** Time has passed: drops that have lasted by now are weighed. To be called after `hear` and again later. */
  pass(at: number, listening: Listening): void;
  /** What the pump's own fold said, after `hear`. `at` is now, ms. */
  push(pumpId: string, signal: AlarmSignal, at: number): void;
  /** What came of it since the last call. */
  take(): AreaSignal[];
  /** The key of the alarm that speaks for this pump's alarm; undefined where it speaks for itself. */
  coveredBy(pumpId: string, detector: Detector): string | undefined;
  /** Pumps that are watched no longer leave their alarms; `pumpIds` are all that are. */
  keep(pumpIds: ReadonlySet<string>, at: number): void;
  /** The alarms that stand, with the pumps they spoke for and those of which something still stands. */
  standing(): readonly AreaStanding[];
  save(): Json;
};

/** Last words within this time of one another are one event, ms. */
const NEAR_IN_TIME_MS = 600_000;
/** Clocks that missed the same shift tell of it within this time, ms. */
const SEASON_MS = 30 * 86_400_000;

type Parts = { readonly state: AreaState; readonly ledger: AreaLedger };

/**
 * A fold over pumps that goes on from what was saved.
 *
 * @example
 * const area = createAreaFold();
 * area.hear({ pumpId, padId, area: 'North' }, lastWordAt, now);
 * area.push(pumpId, silentRaised, now);
 * area.take(); // one alarm for the street once a neighbour is silent too
 */
export function createAreaFold(saved?: unknown): AreaFold {
  const state = restoreAreaState(saved);
  const ledger = createAreaLedger(state);
  const parts = { state, ledger };
  return {
    hear: (pump, silentSince, at, lostAt = 0) => hear(parts, pump, { silentSince, lostAt }, at),
    pass: (at, listening) => weighDrops(parts, at, listening),
    push: (pumpId, signal, at) => {
      const member = state.members.get(pumpId);
      if (member === undefined) return;
      if (signal.detector === 'low-load') loadTold(parts, member, signal, at);
      else if (signal.type === 'cleared') ledger.leave(pumpId, ['daylight-saving'], signal.detector, at);
      else if (signal.detector === 'silent') silenceRaised(parts, member, signal.priority, at);
      else if (signal.cause === 'daylight-saving') shiftRaised(parts, member, signal, at);
      else ledger.leave(pumpId, ['daylight-saving'], signal.detector, at);
    },
    take: ledger.take,
    coveredBy: (pumpId, detector) => findCovering(state, pumpId, detector)?.key,
    keep: (pumpIds, at) => {
      const gone = state.alarms.flatMap(listOpenPumps).filter((pumpId) => !pumpIds.has(pumpId));
      for (const pumpId of gone) ledger.leave(pumpId, AREA_KINDS, undefined, at);
    },
    standing: () =>
      state.alarms.map((alarm) => ({ key: alarm.key, pumpIds: [...alarm.pumpIds], open: listOpenPumps(alarm) })),
    save: () => saveAreaState(state),
  };
}

function findCovering({ alarms }: AreaState, pumpId: string, detector: Detector): AreaAlarm | undefined {
  return alarms.find(({ open }) => open.includes(openKey(pumpId, detector)));
}

type Heard = { readonly silentSince: number | undefined; readonly lostAt: number };

function hear(parts: Parts, pump: AreaPump, { silentSince, lostAt }: Heard, at: number): void {
  const { state, ledger } = parts;
  const { pumpId, padId, area = '' } = pump;
  const member = state.members.get(pumpId) ?? { pumpId, padId, area, silentSince: 0, fellAt: 0, lostAt: 0 };
  Object.assign(member, { padId, area });
  state.members.set(pumpId, member);
  const wasSilent = member.silentSince !== 0;
  if (silentSince === undefined) {
    Object.assign(member, { silentSince: 0, lostAt: 0 });
    if (wasSilent) ledger.leave(pumpId, ['area-silence', 'own-link'], undefined, at);
    return;
  }
  const isNews = !wasSilent || member.lostAt !== lostAt;
  if (!wasSilent) member.silentSince = silentSince;
  member.lostAt = lostAt;
  if (isNews) joinOwnLink(parts, member, at);
}

function joinOwnLink({ state, ledger }: Parts, member: Member, at: number): void {
  const dropped = droppedAt(member);
  const standing = state.alarms.find(
    ({ kind, from }) => kind === 'own-link' && Math.abs(dropped - from) <= NEAR_IN_TIME_MS,
  );
  if (standing !== undefined) ledger.join(standing, member.pumpId, { detector: 'silent', priority: 'note' }, at);
}

function weighDrops({ state, ledger }: Parts, at: number, listening: Listening): void {
  const dropped = listOwnLinkDrops(state, at, listening);
  const [first] = dropped;
  if (first === undefined) return;
  const from = droppedAt(first);
  ledger.raise(
    { kind: 'own-link', detector: 'silent', cause: 'own-link', area: '', from, priority: 'urgent' },
    dropped,
    at,
  );
}

/** The first pump listed as silent speaks for its street, where a pad beside it went at the same time. */
function silenceRaised({ state, ledger }: Parts, member: Member, priority: Priority, at: number): void {
  const { area, silentSince, pumpId } = member;
  if (silentSince === 0) return;
  const near = state.alarms.find(
    (alarm) => alarm.kind === 'area-silence' && alarm.area === area && isNear(alarm.from, member),
  );
  const standing = findCovering(state, pumpId, 'silent') ?? near;
  if (standing !== undefined) {
    ledger.join(standing, pumpId, { detector: 'silent', priority }, at);
    return;
  }
  const together = [...state.members.values()].filter(
    (other) => other.area === area && other.silentSince !== 0 && isNear(silentSince, other),
  );
  if (area === '' || new Set(together.map(({ padId }) => padId)).size < 2) return;
  const from = Math.min(...together.map((other) => other.silentSince));
  ledger.raise({ kind: 'area-silence', detector: 'silent', cause: 'power', area, from, priority }, together, at);
}

type Raised = Extract<AlarmSignal, { type: 'raised' | 'changed' }>;

function shiftRaised({ state, ledger }: Parts, member: Member, { detector, from, priority }: Raised, at: number): void {
  // Wall clocks and motors' own clocks alike: whoever drives out sets both.
  const list = state.alarms.find(({ kind, raisedAt }) => kind === 'daylight-saving' && at - raisedAt <= SEASON_MS);
  if (list !== undefined) ledger.join(list, member.pumpId, { detector, priority }, at);
  else
    ledger.raise(
      { kind: 'daylight-saving', detector, cause: 'daylight-saving', area: '', from, priority },
      [member],
      at,
    );
}

/** Leaves after wind: so many baskets at once are one list, on which each pad stays until its own load is back. */
function loadTold({ state, ledger }: Parts, member: Member, signal: AlarmSignal, at: number): void {
  const { pumpId, area } = member;
  if (signal.type === 'cleared' || signal.cause !== 'sudden') {
    member.fellAt = 0;
    ledger.leave(pumpId, ['load-fall'], 'low-load', at);
    return;
  }
  member.fellAt = signal.from;
  const { priority } = signal;
  const list = findCovering(state, pumpId, 'low-load') ?? findFallList(state, member);
  if (list !== undefined) {
    ledger.join(list, pumpId, { detector: 'low-load', priority }, at);
    return;
  }
  const together = listFallenTogether(state, member);
  if (together.length === 0) return;
  const from = Math.min(...together.map(({ fellAt }) => fellAt));
  ledger.raise({ kind: 'load-fall', detector: 'low-load', cause: 'sudden', area, from, priority }, together, at);
}

function isNear(at: number, { silentSince }: Member): boolean {
  return Math.abs(silentSince - at) <= NEAR_IN_TIME_MS;
}
