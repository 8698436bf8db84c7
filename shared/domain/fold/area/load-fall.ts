import { type AreaAlarm, type AreaState, listOpenPumps, type Member } from './area-state.ts';

/** Loads that fell within this time of one another can have one reason, ms: a front passes, pumps start at their hours. */
const FALLEN_TOGETHER_MS = 6 * 3_600_000;
/** Never fewer pads than so many, and at least this share of the area's. */
const LEAST_PADS = 4;
const LEAST_SHARE = 0.2;

const isTogether = (one: Member | undefined, { fellAt }: Member): boolean =>
  one !== undefined && one.fellAt !== 0 && Math.abs(one.fellAt - fellAt) <= FALLEN_TOGETHER_MS;

const padsOf = (members: readonly Member[]): number => new Set(members.map(({ padId }) => padId)).size;

/**
 * The pumps of an area whose load fell all at once within six hours of this one's, where they are too many for chance;
 * empty otherwise, and where the area is not known. Common practice.
 *
 * @example listFallenTogether(state, member).length // 0 for two plugged baskets in a street
 */
export function listFallenTogether({ members, alarms }: AreaState, member: Member): readonly Member[] {
  const { area } = member;
  if (area === '') return [];
  const listed = new Set(alarms.filter(({ kind }) => kind === 'load-fall').flatMap(listOpenPumps));
  const neighbours = [...members.values()].filter((one) => one.area === area);
  const fallen = neighbours.filter((one) => isTogether(one, member) && !listed.has(one.pumpId));
  const pads = padsOf(fallen);
  return pads >= LEAST_PADS && pads >= LEAST_SHARE * padsOf(neighbours) ? fallen : [];
}

/**
 * The list of those that still stand with whom a pump's load fell: as long as the wind blows, it grows.
 *
 * @example findFallList(state, member)?.kind // 'load-fall', or undefined where nobody's load fell with it
 */
export const findFallList = ({ members, alarms }: AreaState, member: Member): AreaAlarm | undefined =>
  alarms.find(
    (alarm) =>
      alarm.kind === 'load-fall' &&
      alarm.area === member.area &&
      listOpenPumps(alarm).some((pumpId) => isTogether(members.get(pumpId), member)),
  );
