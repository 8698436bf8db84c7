import type { AreaState, Member } from './area-state.ts';

/** Devices that fall silent within this time of one another can have one reason at our end, ms. */
const TOGETHER_MS = 120_000;
/** More than this share of the devices that were heard before; and never fewer than so many. */
const DROPPED_SHARE = 0.2;
const LEAST_DROPPED = 5;
/** Where nearly all of them are of one area and the rest of the fleet is well, it is that area's power, not our link. */
const ONE_AREA_SHARE = 0.8;
const LOST_FOR_LONG_MS = 86_400_000;

/**
 * The members that dropped together with the one that last fell silent, where they are too many and too scattered for
 * anything but our own link; empty otherwise.
 *
 * @example listOwnLinkDrops(state, member).length // 0 for one router that restarts
 */
export function listOwnLinkDrops({ members }: AreaState, { silentSince }: Member): readonly Member[] {
  let watched = 0;
  const dropped: Member[] = [];
  for (const member of members.values()) {
    if (member.silentSince !== 0 && silentSince - member.silentSince > LOST_FOR_LONG_MS) continue;
    watched += 1;
    const since = member.silentSince;
    if (since !== 0 && since <= silentSince && silentSince - since <= TOGETHER_MS) dropped.push(member);
  }
  if (dropped.length < LEAST_DROPPED || dropped.length <= DROPPED_SHARE * watched) return [];
  return isOfOneArea(dropped, members) ? [] : dropped;
}

function isOfOneArea(dropped: readonly Member[], members: ReadonlyMap<string, Member>): boolean {
  const counts = new Map<string, number>();
  for (const { area } of dropped) if (area !== '') counts.set(area, (counts.get(area) ?? 0) + 1);
  const [area, count] = [...counts].reduce((most, one) => (one[1] > most[1] ? one : most), ['', 0] as [string, number]);
  if (count < ONE_AREA_SHARE * dropped.length) return false;
  // A fleet that is all one area cannot tell the two apart by place.
  return [...members.values()].some((member) => member.area !== area && member.silentSince === 0);
}
