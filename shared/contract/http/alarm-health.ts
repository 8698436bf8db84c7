import { z } from 'zod';
import { HEALTH_METRICS } from '#shared/domain/alarm-health/judge-health.ts';
import { DETECTORS, PRIORITIES } from '#shared/domain/detectors/detector.ts';
import { Id, Instant } from '../primitives.ts';
import { Evidence } from './alarms.ts';
import { defineEndpoint, MANAGERS } from './endpoint.ts';
import { LocalDay } from './energy-figures.ts';

const DAY_MS = 86_400_000;
const MOST_DAYS = 400;

/**
 * Local days of the company's zone, `until` not included. Without either: the last 30 days and today. At most 400 days;
 * what lies before the first reading or after now is cut off.
 */
export const AlarmHealthQuery = z
  .object({ from: LocalDay.optional(), until: LocalDay.optional() })
  .refine(({ from, until }) => (from === undefined) === (until === undefined), {
    message: 'from and until come together',
    path: ['until'],
  })
  .refine(
    ({ from, until }) =>
      from === undefined ||
      until === undefined ||
      (from < until && Date.parse(until) - Date.parse(from) <= MOST_DAYS * DAY_MS),
    { message: `until must lie after from, by at most ${MOST_DAYS} days`, path: ['until'] },
  );
export type AlarmHealthQuery = z.infer<typeof AlarmHealthQuery>;

const Count = z.number().int().min(0);

/** An alarm to look at, with the names a screen shows beside it. Without a pump it speaks for several. */
export const NamedAlarm = z.object({
  alarmId: Id,
  pumpId: Id.nullable(),
  padName: z.string().nullable(),
  pumpName: z.string().nullable(),
  detector: z.enum(DETECTORS),
  cause: z.string(),
  evidence: Evidence,
});
export type NamedAlarm = z.infer<typeof NamedAlarm>;

const Offender = NamedAlarm.extend({ count: Count });
export type Offender = z.infer<typeof Offender>;

const ByPriority = z.object({ urgent: Count, soon: Count, note: Count });
const SetAside = z.object({ begun: Count, now: Count });

/** Figures of one operator's alarms. Rates are per operator; shares 0 to 1; null where there is nothing to take one of. */
export const AlarmHealthFigures = z.object({
  count: Count,
  days: z.number(),
  perDay: z.number(),
  perHour: z.number(),
  perTenMinutes: z.number(),
  byDay: z.array(ByPriority.extend({ from: Instant })),
  /** 10-minute periods of the clock: `above` of `count` had more than 10. */
  periods: z.object({
    count: Count,
    most: Count,
    mostAt: Instant.nullable(),
    above: Count,
    inFlood: Count,
    floods: z.array(z.object({ from: Instant, to: Instant, count: Count, most: Count })),
  }),
  priorities: ByPriority,
  topTen: z.array(Offender),
  topTenShare: z.number().nullable(),
  chattering: z.array(Offender),
  fleeting: z.array(Offender),
  stale: z.object({
    now: z.array(NamedAlarm.extend({ since: Instant })),
    nowCount: Count,
    most: Count,
    mostOn: Instant.nullable(),
  }),
  acknowledging: z.array(
    z.object({
      priority: z.enum(PRIORITIES),
      count: Count,
      acknowledged: Count,
      medianMs: z.number().nullable(),
      slowMs: z.number().nullable(),
      limitMs: z.number().nullable(),
      inTime: Count.nullable(),
      escalated: Count,
      waiting: Count,
    }),
  ),
  aside: z.object({ shelved: SetAside, suppressed: SetAside, outOfService: SetAside, unexplained: Count }),
  judgements: z.array(
    z.object({
      metric: z.enum(HEALTH_METRICS),
      /** `most`: above what is acceptable, within what can be managed. `few`: too few alarms to tell. */
      verdict: z.enum(['within', 'most', 'over', 'few']),
      source: z.string(),
    }),
  ),
});
export type AlarmHealthFigures = z.infer<typeof AlarmHealthFigures>;

export const AlarmHealth = z.object({
  zone: z.string(),
  from: Instant,
  until: Instant,
  /** The standard wants so many days before its figures mean much. */
  leastDays: z.number(),
  /** Every alarm of the company, as for one desk that looks after all of them. */
  desk: AlarmHealthFigures,
  /** By the technician who answers for the pad today, the busiest first. */
  operators: z.array(z.object({ operatorId: Id, name: z.string(), figures: AlarmHealthFigures })),
  serverNow: Instant,
});
export type AlarmHealth = z.infer<typeof AlarmHealth>;

export const alarmHealthEndpoints = {
  read: defineEndpoint({
    method: 'GET',
    path: '/api/alarm-health',
    summary: 'How the alarms themselves do, beside the targets of ISA-18.2',
    roles: MANAGERS,
    query: AlarmHealthQuery,
    response: AlarmHealth,
  }),
};
