import { DETECTORS, type Detector, PRIORITIES, type Priority } from '#shared/domain/detectors/detector.ts';
import { isRecord, type Json } from '#shared/domain/detectors/plain-state.ts';
import type { AreaKind } from './area-signal.ts';

/**
 * A pump among its neighbours; `silentSince` = its last word, ms, 0 while it is heard; `fellAt` = when its load fell all
 * at once, ms, 0 while no such alarm stands; `lostAt` = when its connection dropped, ms, 0 where it stands or nothing is
 * known of it.
 */
export type Member = {
  readonly pumpId: string;
  padId: string;
  area: string;
  silentSince: number;
  fellAt: number;
  lostAt: number;
};

/** An alarm that speaks for several pumps; `open` names the pumps and detectors whose own condition still stands. */
export type AreaAlarm = {
  readonly key: string;
  readonly kind: AreaKind;
  readonly detector: Detector;
  readonly area: string;
  readonly from: number;
  readonly raisedAt: number;
  readonly cause: string;
  priority: Priority;
  pumpIds: string[];
  open: string[];
};

export type AreaState = { readonly members: Map<string, Member>; alarms: AreaAlarm[] };

export const AREA_KINDS: readonly AreaKind[] = ['area-silence', 'daylight-saving', 'load-fall', 'own-link'];

/**
 * One condition of one pump, as an alarm that speaks for several keeps it.
 *
 * @example openKey(pumpId, 'silent') // `${pumpId} silent`
 */
export const openKey = (pumpId: string, detector: Detector): string => `${pumpId} ${detector}`;

export const isOfPump = (own: string, pumpId: string): boolean => own.startsWith(`${pumpId} `);

/**
 * The pumps of which something still stands, in order of joining.
 *
 * @example listOpenPumps({ open: ['a silent', 'a stopped', 'b silent'] }) // ['a', 'b']
 */
export const listOpenPumps = ({ open }: Pick<AreaAlarm, 'open'>): readonly string[] => [
  ...new Set(open.map((own) => own.slice(0, own.lastIndexOf(' ')))),
];

/**
 * The state as plain JSON.
 *
 * @example restoreAreaState(saveAreaState(state)) // as it was
 */
export function saveAreaState({ members, alarms }: AreaState): Json {
  return {
    members: [...members.values()].map(({ pumpId, padId, area, silentSince, fellAt, lostAt }) => [
      pumpId,
      padId,
      area,
      silentSince,
      fellAt,
      lostAt,
    ]),
    alarms: alarms.map((alarm) => ({ ...alarm, pumpIds: [...alarm.pumpIds], open: [...alarm.open] })),
  };
}

/**
 * The state that `saveAreaState` wrote; what cannot be read back is left out.
 *
 * @example restoreAreaState(undefined).members.size // 0
 */
export function restoreAreaState(saved: unknown): AreaState {
  const record = isRecord(saved) ? saved : {};
  const members = Array.isArray(record.members) ? record.members.flatMap(parseMember) : [];
  const alarms = Array.isArray(record.alarms) ? record.alarms.flatMap(parseAlarm) : [];
  return { members: new Map(members.map((member) => [member.pumpId, member])), alarms };
}

function parseMember(value: unknown): Member[] {
  if (!Array.isArray(value)) return [];
  const [pumpId, padId, area, silentSince, fellAt = 0, lostAt = 0]: readonly unknown[] = value;
  if (typeof pumpId !== 'string' || typeof padId !== 'string' || typeof area !== 'string') return [];
  if (typeof silentSince !== 'number' || typeof fellAt !== 'number' || typeof lostAt !== 'number') return [];
  return [{ pumpId, padId, area, silentSince, fellAt, lostAt }];
}

function parseAlarm(value: unknown): AreaAlarm[] {
  if (!isRecord(value)) return [];
  const { key, area, from, raisedAt, cause, pumpIds, open } = value;
  const kind = AREA_KINDS.find((one) => one === value.kind);
  const detector = DETECTORS.find((one) => one === value.detector);
  const priority = PRIORITIES.find((one) => one === value.priority);
  if (kind === undefined || detector === undefined || priority === undefined) return [];
  if (typeof key !== 'string' || typeof area !== 'string' || typeof cause !== 'string') return [];
  if (typeof from !== 'number' || typeof raisedAt !== 'number' || !isNames(pumpIds) || !isNames(open)) return [];
  return [{ key, kind, detector, area, from, raisedAt, cause, priority, pumpIds: [...pumpIds], open: [...open] }];
}

function isNames(value: unknown): value is readonly string[] {
  return Array.isArray(value) && value.every((one) => typeof one === 'string');
}
