import { type AreaState, isOfPump, type Member } from './area-state.ts';

/** What our own hearing is worth. */
export type Listening = {
  /** Since when we have been listening without a break, ms. */
  readonly since: number;
  /** Devices' connections are followed; without, as in a trace of readings alone, only silence is known. */
  readonly knowsDrops: boolean;
};

/** Devices that drop within this time of one another can have one reason at our end, ms. */
const TOGETHER_MS = 120_000;
/** What drops before we listened for one full limit of silence may be of our own starting, ms. */
const FULL_LIMIT_MS = 120_000;
/** A drop counts once the device has stayed away so long: one that comes back took another way or was moved on, ms. */
export const STAYED_AWAY_MS = 150_000;
/** More than this share of the devices that were heard before; and never fewer than so many. */
const DROPPED_SHARE = 0.2;
const LEAST_DROPPED = 5;
/** Readings that stop are no dropped connections: alone they tell of our link when nearly all stop, for longer, ms. */
const SILENT_SHARE = 0.8;
const STAYED_SILENT_MS = 600_000;
/** A drop is weighed when it has lasted long enough and no more after this, ms. */
const WEIGHED_FOR_MS = 600_000;
/** Where nearly all of them are of one area and the rest of the fleet is well, it is that area's power, not our link. */
const ONE_AREA_SHARE = 0.8;
const LOST_FOR_LONG_MS = 86_400_000;

/**
 * When a member dropped as our link sees it, ms; 0 = it did not.
 *
 * @example droppedAt({ ...member, lostAt: 0, silentSince: 0 }) // 0: it did not
 */
export const droppedAt = ({ lostAt, silentSince }: Member): number => (lostAt === 0 ? silentSince : lostAt);

/**
 * The members that dropped together and stayed away, where they are too many and too scattered for anything but our own
 * link; empty otherwise. `at` is now, ms.
 *
 * @example listOwnLinkDrops(state, now, { since: startedAt, knowsDrops: true }).length // 0 while one router restarts
 */
export function listOwnLinkDrops(state: AreaState, at: number, listening: Listening): readonly Member[] {
  const { knowsDrops } = listening;
  const gone = listGone(state, knowsDrops).filter((member) => droppedAt(member) >= listening.since + FULL_LIMIT_MS);
  const stayedMs = knowsDrops ? STAYED_AWAY_MS : STAYED_SILENT_MS;
  const weighed = gone.filter((member) => {
    const awayMs = at - droppedAt(member);
    return awayMs >= stayedMs && awayMs <= stayedMs + WEIGHED_FOR_MS;
  });
  const together = findLargestTogether(weighed);
  const share = knowsDrops ? DROPPED_SHARE : SILENT_SHARE;
  const [first] = together;
  if (first === undefined || together.length < LEAST_DROPPED) return [];
  if (together.length <= share * countWatched(state, at) || isOfOneArea(together, state.members)) return [];
  // Those of the same minutes that have not been away long enough to be counted are of it too.
  return gone.filter((one) => droppedAt(one) >= droppedAt(first) && droppedAt(one) <= droppedAt(first) + TOGETHER_MS);
}

/** Members that are gone and of which no alarm about our link speaks, in order of dropping. */
function listGone({ members, alarms }: AreaState, knowsDrops: boolean): Member[] {
  const told = alarms.filter(({ kind }) => kind === 'own-link').flatMap(({ open }) => open);
  return [...members.values()]
    .filter(({ lostAt, silentSince }) => (knowsDrops ? lostAt : silentSince) !== 0)
    .filter(({ pumpId }) => !told.some((own) => isOfPump(own, pumpId)))
    .sort((one, other) => droppedAt(one) - droppedAt(other));
}

function findLargestTogether(sorted: readonly Member[]): readonly Member[] {
  let best: readonly [number, number] = [0, 0];
  let from = 0;
  for (const [index, member] of sorted.entries()) {
    for (let first = sorted[from]; first !== undefined && first !== member; first = sorted[from]) {
      if (droppedAt(member) - droppedAt(first) <= TOGETHER_MS) break;
      from += 1;
    }
    if (index + 1 - from > best[1] - best[0]) best = [from, index + 1];
  }
  return sorted.slice(...best);
}

function countWatched({ members }: AreaState, at: number): number {
  let watched = 0;
  for (const { silentSince } of members.values())
    if (silentSince === 0 || at - silentSince <= LOST_FOR_LONG_MS) watched += 1;
  return watched;
}

function isOfOneArea(dropped: readonly Member[], members: ReadonlyMap<string, Member>): boolean {
  const counts = new Map<string, number>();
  for (const { area } of dropped) if (area !== '') counts.set(area, (counts.get(area) ?? 0) + 1);
  const [area, count] = [...counts].reduce((most, one) => (one[1] > most[1] ? one : most), ['', 0] as [string, number]);
  if (count < ONE_AREA_SHARE * dropped.length) return false;
  // A fleet that is all one area cannot tell the two apart by place.
  return [...members.values()].some((member) => member.area !== area && member.silentSince === 0);
}
