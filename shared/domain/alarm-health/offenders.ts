import type { Detector } from '../detectors/detector.ts';
import { groupBy } from '../grouping/group-by.ts';
import { keyOf } from './alarm-life.ts';
import { HEALTH_TARGETS } from './health-targets.data.ts';
import type { LifeStory } from './life-story.ts';

/** What repeats, how often, and the newest of its alarms to look at. */
export type Offender = {
  readonly pumpId: string | null;
  readonly detector: Detector;
  readonly alarmId: string;
  readonly count: number;
};

/** Adds up what `countOf` finds in each alarm by pump and detector, the most first; what has none is left out. */
export function rankOffenders(stories: readonly LifeStory[], countOf: (story: LifeStory) => number): Offender[] {
  const byKey = new Map<string, { offender: Offender; newest: number }>();
  for (const story of stories) {
    const count = countOf(story);
    if (count === 0) continue;
    const { alarmId, pumpId, detector, changes } = story.life;
    const newest = changes.at(-1)?.at ?? 0;
    const before = byKey.get(keyOf(story.life));
    const latest = before !== undefined && before.newest > newest ? before.offender.alarmId : alarmId;
    byKey.set(keyOf(story.life), {
      offender: { pumpId, detector, alarmId: latest, count: count + (before?.offender.count ?? 0) },
      newest: Math.max(newest, before?.newest ?? 0),
    });
  }
  return [...byKey.values()].map(({ offender }) => offender).sort((a, b) => b.count - a.count);
}

/**
 * Which alarms chatter: their condition ended three or more times within a minute. Counted in bursts.
 *
 * @example findChattering(stories, 0, until) // []: none, as it should be
 */
export function findChattering(stories: readonly LifeStory[], from: number, until: number): Offender[] {
  const together = [...groupBy(stories, ({ life }) => keyOf(life)).values()].flatMap((own): LifeStory[] => {
    const last = own.at(-1);
    return last === undefined ? [] : [{ ...last, returns: own.flatMap(({ returns }) => returns) }];
  });
  return rankOffenders(together, ({ returns }) => countBursts(returns.filter((at) => at >= from && at < until)));
}

function countBursts(returns: readonly number[]): number {
  const { returns: least, withinMs } = HEALTH_TARGETS.chattering;
  const sorted = returns.toSorted((a, b) => a - b);
  let bursts = 0;
  for (let index = least - 1; index < sorted.length; index += 1) {
    if ((sorted[index] ?? 0) - (sorted[index - least + 1] ?? 0) > withinMs) continue;
    bursts += 1;
    const end = sorted[index] ?? 0;
    while (index + 1 < sorted.length && (sorted[index + 1] ?? 0) - end <= withinMs) index += 1;
    index += least - 1;
  }
  return bursts;
}

/** Which alarms were over within seconds: nobody can respond to those. */
export const findFleeting = (stories: readonly LifeStory[], from: number, until: number): Offender[] =>
  rankOffenders(
    stories,
    ({ standings }) =>
      standings.filter(
        (one) =>
          one.to !== null &&
          one.from >= from &&
          one.from < until &&
          one.to - one.from < HEALTH_TARGETS.fleeting.belowMs,
      ).length,
  );
