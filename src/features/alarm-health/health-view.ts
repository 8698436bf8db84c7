import type { AlarmHealthFigures } from '#shared/contract/http/alarm-health.ts';
import { HEALTH_TARGETS } from '#shared/domain/alarm-health/health-targets.data.ts';
import type { HealthMetric } from '#shared/domain/alarm-health/judge-health.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/health-words.ts';

type Figures = AlarmHealthFigures;
const T = HEALTH_TARGETS;

/** Small rates need their tenths, large ones do not. */
const rate = (value: number, format: Format) =>
  format.number(value, value === 0 || value >= 100 ? 0 : value >= 1 ? 1 : 2);

/** A share with a tenth where a whole per cent would hide it. */
export const percent = (share: number, format: Format): string =>
  `${format.number(share * 100, share > 0 && share < 0.0995 ? 1 : 0)} %`;

const whole = (share: number, format: Format) => `${format.number(share * 100)} %`;

type Said = (figures: Figures, format: Format, zone: string) => string;

const topTen: Said = ({ count, topTenShare }, format) => {
  if (topTenShare === null) return t('health.found.none');
  const least = Math.min(1, T.topTen.count / count);
  const share = percent(topTenShare, format);
  return least > T.topTen.mostShare
    ? t('health.found.top-ten.few', { share, count, least: percent(least, format) })
    : t('health.found.top-ten', { share, count });
};

const priorities: Said = ({ count, priorities: found }, format) => {
  if (count === 0) return t('health.found.none');
  const share = (part: number) => whole(part / count, format);
  return t('health.found.priorities', {
    urgent: share(found.urgent),
    soon: share(found.soon),
    note: share(found.note),
  });
};

const stale: Said = ({ stale: { most, mostOn, nowCount } }, format, zone) =>
  mostOn === null
    ? t('health.found.stale.none')
    : t('health.found.stale', { most, day: format.day(mostOn, zone), now: nowCount });

/** What was found, as a sentence. */
const FOUND: Readonly<Record<HealthMetric, Said>> = {
  rate: ({ perDay, perHour }, format) =>
    t('health.found.rate', { perDay: rate(perDay, format), perHour: rate(perHour, format) }),
  'ten-minutes': ({ perTenMinutes }, format) => t('health.found.ten-minutes', { rate: rate(perTenMinutes, format) }),
  peak: ({ periods }) =>
    periods.most === 0
      ? t('health.found.peakNone', { periods: periods.count })
      : t('health.found.peak', {
          above: periods.above,
          periods: periods.count,
          limit: T.peak.above,
          most: periods.most,
        }),
  flood: ({ periods }, format) =>
    periods.floods.length === 0
      ? t('health.found.flood.none')
      : t('health.found.flood', {
          count: periods.floods.length,
          share: percent(periods.inFlood / Math.max(1, periods.count), format),
        }),
  'top-ten': topTen,
  chattering: ({ chattering: { length: count } }) =>
    count === 0 ? t('health.found.chattering.none') : t('health.found.chattering', { count }),
  fleeting: ({ fleeting: { length: count } }) =>
    count === 0 ? t('health.found.fleeting.none') : t('health.found.fleeting', { count }),
  stale,
  priorities,
  unexplained: ({ aside }) =>
    t('health.found.unexplained', {
      shelved: aside.shelved.begun,
      suppressed: aside.suppressed.begun,
      out: aside.outOfService.begun,
      unexplained: aside.unexplained,
    }),
};

const aim = (share: number, format: Format) => whole(share, format);

/** What is aimed at, in words. */
const TARGET: Readonly<Record<HealthMetric, (format: Format) => string>> = {
  rate: () => t('health.target.rate', T.perDay),
  'ten-minutes': () => t('health.target.ten-minutes', T.perTenMinutes),
  peak: (format) => t('health.target.peak', { share: aim(T.peak.mostShare, format), limit: T.peak.above }),
  flood: (format) =>
    t('health.target.flood', {
      begins: T.flood.beginsAbove,
      ends: T.flood.endsBelow,
      share: aim(T.flood.mostShare, format),
    }),
  'top-ten': (format) => t('health.target.top-ten', { share: aim(T.topTen.mostShare, format) }),
  chattering: () => t('health.target.chattering'),
  fleeting: () => t('health.target.fleeting', { seconds: T.fleeting.belowMs / 1000 }),
  stale: () => t('health.target.stale', { limit: T.stale.fewerThan }),
  priorities: (format) =>
    t('health.target.priorities', {
      urgent: aim(T.priorities.urgent, format),
      soon: aim(T.priorities.soon, format),
      note: aim(T.priorities.note, format),
    }),
  unexplained: () => t('health.target.unexplained'),
};

export type HealthFact = {
  readonly metric: HealthMetric;
  readonly name: string;
  readonly found: string;
  readonly target: string;
  readonly verdict: Figures['judgements'][number]['verdict'];
  readonly source: string;
};

/** Every figure as a sentence, beside its target and the verdict. */
export const listFacts = (figures: Figures, format: Format, zone: string): HealthFact[] =>
  figures.judgements.map(({ metric, verdict, source }) => ({
    metric,
    name: t(`health.metric.${metric}`),
    found: FOUND[metric](figures, format, zone),
    target: TARGET[metric](format),
    verdict,
    source,
  }));

/** How many figures are over their targets. */
export const countOver = ({ judgements }: Pick<Figures, 'judgements'>): number =>
  judgements.filter(({ verdict }) => verdict === 'over').length;

/** The page's fact. */
export function headingOf(figures: Figures, format: Format): string {
  if (figures.count === 0) return t('health.heading.none');
  const over = countOver(figures);
  return over > 0
    ? t('health.heading.over', { count: over })
    : t('health.heading.good', { perDay: rate(figures.perDay, format) });
}
