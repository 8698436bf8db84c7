import type { HealthFigures } from './health-figures.ts';
import { CHATTER_SOURCE, FLOOD_SOURCE, HEALTH_SOURCE, HEALTH_TARGETS } from './health-targets.data.ts';

export const HEALTH_METRICS = [
  'rate',
  'ten-minutes',
  'peak',
  'flood',
  'top-ten',
  'chattering',
  'fleeting',
  'stale',
  'priorities',
  'unexplained',
] as const;
export type HealthMetric = (typeof HEALTH_METRICS)[number];

/** `most` = above what is acceptable and within what can be managed; `few` = too few alarms to tell. */
export type Verdict = 'within' | 'most' | 'over' | 'few';

export type Judgement = { readonly metric: HealthMetric; readonly verdict: Verdict; readonly source: string };

const T = HEALTH_TARGETS;

/** The least count at which one alarm is no more than the share aimed at. */
const tellsShare = (count: number, share: number): boolean => count > 0 && 1 / count <= share;

const within = (fits: boolean): Verdict => (fits ? 'within' : 'over');

const ofTwo = (value: number, { acceptable, most }: { readonly acceptable: number; readonly most: number }): Verdict =>
  value <= acceptable ? 'within' : value <= most ? 'most' : 'over';

function judgeTopTen({ count, topTenShare }: HealthFigures): Verdict {
  // Ten kinds of alarm cannot have less of `count` than ten of them: below 200 the target is out of anybody's reach.
  const least = count === 0 ? 1 : T.topTen.count / count;
  return least > T.topTen.mostShare || topTenShare === null ? 'few' : within(topTenShare <= T.topTen.mostShare);
}

/** The standard says "about": a share that rounds to the aim is within it. Fewer urgent ones than that are no fault. */
function judgePriorities({ count, priorities }: HealthFigures): Verdict {
  if (!tellsShare(count, T.priorities.urgent)) return 'few';
  const fits = (share: number, aim: number) => Math.round(share * 100) <= aim * 100;
  return within(
    fits(priorities.urgent / count, T.priorities.urgent) &&
      fits((priorities.urgent + priorities.soon) / count, T.priorities.urgent + T.priorities.soon),
  );
}

/**
 * Every figure beside its target. Targets are per operator: of a company with several they say how busy one desk that
 * looks after everything would be.
 *
 * @example judgeHealth(figures).find(({ metric }) => metric === 'rate')?.verdict // 'within'
 */
export function judgeHealth(figures: HealthFigures): Judgement[] {
  const { periods, chattering, fleeting, stale, aside } = figures;
  const share = (count: number) => (periods.periods === 0 ? 0 : count / periods.periods);
  const judge = (metric: HealthMetric, verdict: Verdict, source = HEALTH_SOURCE): Judgement => ({
    metric,
    verdict,
    source,
  });
  return [
    judge('rate', ofTwo(figures.perDay, T.perDay)),
    judge('ten-minutes', ofTwo(figures.perTenMinutes, T.perTenMinutes)),
    judge('peak', within(share(periods.above) < T.peak.mostShare && periods.most <= T.peak.above)),
    judge('flood', within(share(periods.floodPeriods) < T.flood.mostShare), FLOOD_SOURCE),
    judge('top-ten', judgeTopTen(figures)),
    judge('chattering', within(chattering.length <= T.chattering.most), CHATTER_SOURCE),
    judge('fleeting', within(fleeting.length <= T.fleeting.most), CHATTER_SOURCE),
    judge('stale', within(stale.most < T.stale.fewerThan)),
    judge('priorities', judgePriorities(figures)),
    judge('unexplained', within(aside.unexplained <= T.unexplained.most)),
  ];
}
