import { PRIORITIES, type Priority } from '../detectors/detector.ts';
import type { LocalDay } from '../time/local-days.ts';
import { DAY_MS } from '../time/local-time.ts';
import { type AcknowledgeFigures, acknowledgeFigures } from './acknowledge-figures.ts';
import { type AsideFigures, asideFigures } from './aside-figures.ts';
import { countPeriods, type PeriodFigures } from './count-periods.ts';
import { HEALTH_TARGETS } from './health-targets.data.ts';
import type { LifeStory } from './life-story.ts';
import { findChattering, findFleeting, type Offender, rankOffenders } from './offenders.ts';
import { findStale, type StaleFigures } from './stale-alarms.ts';

/** A stretch to measure, half-open, ms, with the local days that share time with it, in order. */
export type HealthStretch = { readonly from: number; readonly until: number; readonly days: readonly LocalDay[] };

export type DayCount = { readonly from: number } & { readonly [Each in Priority]: number };

/** What one operator's alarms came to in a stretch. Shares are 0 to 1; null where there was nothing to take a share of. */
export type HealthFigures = {
  readonly count: number;
  /** Whole and part days measured. */
  readonly days: number;
  readonly perDay: number;
  readonly perHour: number;
  readonly perTenMinutes: number;
  readonly byDay: readonly DayCount[];
  readonly periods: PeriodFigures;
  readonly priorities: { readonly [Each in Priority]: number };
  readonly topTen: readonly Offender[];
  readonly topTenShare: number | null;
  readonly chattering: readonly Offender[];
  readonly fleeting: readonly Offender[];
  readonly stale: StaleFigures;
  readonly acknowledging: readonly AcknowledgeFigures[];
  readonly aside: AsideFigures;
};

/**
 * The performance figures of ISA-18.2 over the alarms of one operator, or of a company.
 *
 * @example healthFigures(stories, { from: 0, until: 30 * 86_400_000, days }).perDay // 2.4
 */
export function healthFigures(stories: readonly LifeStory[], stretch: HealthStretch): HealthFigures {
  const { from, until, days } = stretch;
  const isIn = ({ at }: { readonly at: number }) => at >= from && at < until;
  const annunciations = stories.flatMap((story) => story.annunciations.filter(isIn));
  const measured = Math.max(until - from, 0) / DAY_MS;
  const count = annunciations.length;
  const perDay = measured === 0 ? 0 : count / measured;
  const offenders = rankOffenders(stories, (story) => story.annunciations.filter(isIn).length);
  const topTen = offenders.slice(0, HEALTH_TARGETS.topTen.count);
  const inTopTen = topTen.reduce((sum, offender) => sum + offender.count, 0);
  return {
    count,
    days: measured,
    perDay,
    perHour: perDay / 24,
    perTenMinutes: perDay / 144,
    byDay: days.map((day) => ({
      from: day.from,
      ...countPriorities(annunciations.filter(({ at }) => at >= day.from && at < day.to)),
    })),
    periods: countPeriods(
      annunciations.map(({ at }) => at),
      from,
      until,
    ),
    priorities: countPriorities(annunciations),
    topTen,
    topTenShare: count === 0 ? null : inTopTen / count,
    chattering: findChattering(stories, from, until),
    fleeting: findFleeting(stories, from, until),
    stale: findStale(stories, days, until),
    acknowledging: acknowledgeFigures(annunciations),
    aside: asideFigures(stories, from, until),
  };
}

const countPriorities = (annunciations: readonly { readonly priority: Priority }[]) =>
  Object.fromEntries(
    PRIORITIES.map((priority) => [priority, annunciations.filter((one) => one.priority === priority).length]),
  ) as Record<Priority, number>;
