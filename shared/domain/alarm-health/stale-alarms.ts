import type { LocalDay } from '../time/local-days.ts';
import { HEALTH_TARGETS } from './health-targets.data.ts';
import type { LifeStory } from './life-story.ts';

/** An alarm that has stood for longer than a day, and since when. */
export type StaleAlarm = {
  readonly alarmId: string;
  readonly pumpId: string | null;
  readonly detector: LifeStory['life']['detector'];
  readonly since: number;
};

export type StaleFigures = {
  /** Those that stand now, the oldest first. */
  readonly now: readonly StaleAlarm[];
  /** The most on any one local day, and which day that was. */
  readonly most: number;
  readonly mostOn: number | null;
};

const { afterMs } = HEALTH_TARGETS.stale;

/** Alarms that stood before their operator for over 24 h: how many on each local day (`days`, in order), and now. */
export function findStale(stories: readonly LifeStory[], days: readonly LocalDay[], until: number): StaleFigures {
  const counts = days.map(() => 0);
  const now: StaleAlarm[] = [];
  for (const { life, standings } of stories) {
    for (const standing of standings) {
      const staleFrom = standing.from + afterMs;
      const to = Math.min(standing.to ?? until, until);
      if (staleFrom >= to) continue;
      days.forEach((day, index) => {
        if (staleFrom < day.to && to > day.from) counts[index] = (counts[index] ?? 0) + 1;
      });
      const { alarmId, pumpId, detector } = life;
      if (standing.to === null) now.push({ alarmId, pumpId, detector, since: standing.from });
    }
  }
  const most = Math.max(0, ...counts);
  const mostOn = most === 0 ? null : (days[counts.indexOf(most)]?.from ?? null);
  return { now: now.sort((a, b) => a.since - b.since), most, mostOn };
}
