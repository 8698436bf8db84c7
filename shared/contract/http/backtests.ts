import { z } from 'zod';
import { DETECTORS, PRIORITIES } from '#shared/domain/detectors/detector.ts';
import { Id, Instant } from '../primitives.ts';
import { defineEndpoint, MANAGERS } from './endpoint.ts';
import { RuleScope, RuleSettingsShape, StoredRules } from './rules.ts';

/** Readings are kept so long. */
export const LONGEST_BACKTEST_DAYS = 60;
const DAY_MS = 86_400_000;

export const AskBacktest = z
  .strictObject({
    /** For whom the rules would be set; the pumps it reaches are folded. */
    scope: RuleScope,
    /** What would stand there in place of what does. */
    rules: RuleSettingsShape,
    from: Instant,
    to: Instant,
  })
  .refine(({ from, to }) => from < to, { path: ['to'], message: 'lies after "from"' })
  .refine(({ from, to }) => to - from <= LONGEST_BACKTEST_DAYS * DAY_MS, {
    path: ['from'],
    message: `lies at most ${LONGEST_BACKTEST_DAYS} days before "to": readings are kept so long`,
  });
export type AskBacktest = z.output<typeof AskBacktest>;

export const BACKTEST_STATES = ['waiting', 'running', 'done', 'failed', 'cancelled'] as const;

export const Backtest = z.object({
  id: Id,
  state: z.enum(BACKTEST_STATES),
  scope: RuleScope,
  rules: StoredRules,
  from: Instant,
  to: Instant,
  askedAt: Instant,
  askedBy: z.string().nullable(),
  startedAt: Instant.nullable(),
  endedAt: Instant.nullable(),
  pumps: z.number().int(),
  pumpsDone: z.number().int(),
  readings: z.number().int(),
  /** 0 to 1. */
  progress: z.number().min(0).max(1),
  /** Somebody called it off; the worker ends it in a moment. */
  cancelAsked: z.boolean(),
  failure: z.string().nullable(),
});
export type Backtest = z.infer<typeof Backtest>;

export const BacktestAlarm = z.object({
  detector: z.enum(DETECTORS),
  alarmClass: z.enum(['alarm', 'note']),
  priority: z.enum(PRIORITIES),
  cause: z.string(),
  from: Instant,
  raised: Instant,
  to: Instant.nullable(),
});

export const ComparedAlarm = z.object({
  difference: z.enum(['same', 'changed', 'gone', 'new']),
  before: BacktestAlarm.nullable(),
  after: BacktestAlarm.nullable(),
});
export type ComparedAlarm = z.infer<typeof ComparedAlarm>;

const Counts = z.object({
  before: z.number().int(),
  after: z.number().int(),
  same: z.number().int(),
  changed: z.number().int(),
  gone: z.number().int(),
  new: z.number().int(),
});
export type BacktestCounts = z.infer<typeof Counts>;

export const BacktestPump = z.object({
  pumpId: Id,
  pumpName: z.string(),
  padName: z.string(),
  zone: z.string(),
  counts: Counts,
  alarms: z.array(ComparedAlarm),
});
export type BacktestPump = z.infer<typeof BacktestPump>;

export const BacktestResult = Backtest.extend({
  counts: Counts,
  detectors: z.array(Counts.extend({ detector: z.enum(DETECTORS) })),
  /** Alarms of that time that were answered with "nothing to do", and how many of them each version raises. */
  needless: z.object({ answered: z.number().int(), before: z.number().int(), after: z.number().int() }),
  /** The pumps on which something differs, those with most first; `morePumps` more have been left out. */
  differing: z.array(BacktestPump),
  morePumps: z.number().int(),
  /** Pumps that could not be folded. */
  failedPumps: z.number().int(),
});
export type BacktestResult = z.infer<typeof BacktestResult>;

const BacktestParams = z.object({ backtestId: Id });

export const backtestEndpoints = {
  ask: defineEndpoint({
    method: 'POST',
    path: '/api/backtests',
    summary: 'Try a change of rules on what is stored; one at a time a company',
    roles: MANAGERS,
    status: 201,
    body: AskBacktest,
    response: Backtest,
    idempotent: true,
  }),
  list: defineEndpoint({
    method: 'GET',
    path: '/api/backtests',
    summary: 'The latest backtests, the newest first',
    roles: MANAGERS,
    response: z.object({ items: z.array(Backtest) }),
  }),
  read: defineEndpoint({
    method: 'GET',
    path: '/api/backtests/:backtestId',
    summary: 'How far a backtest is, and what it found',
    roles: MANAGERS,
    params: BacktestParams,
    response: BacktestResult,
  }),
  cancel: defineEndpoint({
    method: 'DELETE',
    path: '/api/backtests/:backtestId',
    summary: 'Call a backtest off; one that has ended stays as it is',
    roles: MANAGERS,
    params: BacktestParams,
    response: Backtest,
  }),
};
