import { z } from 'zod';
import { NEED_KINDS } from '#shared/domain/advisor/pad-needs.ts';
import { Id, Instant, pageOf, pageQuery } from '../primitives.ts';
import { defineEndpoint, STAFF } from './endpoint.ts';
import { MoneyText } from './energy-figures.ts';
import { MotorSettingsShape } from './pump-settings.ts';
import { PlannedRun } from './runs.ts';

/** What calls for a run: an entry of the program (from 0) or a clock on an input (from 1). */
const Caller = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('program'), entry: z.number().int() }),
  z.object({ kind: z.literal('clock'), input: z.number().int() }),
]);

/** What one caller runs in dear hours, and what the same energy would cost less at the cheapest hour of the day. */
export const DearHours = z.object({
  caller: Caller,
  /** Months (0 = January) in which it does. */
  months: z.array(z.object({ month: z.number().int(), minutesPerWeek: z.number(), extraPerWeek: MoneyText })),
  extraPerYear: MoneyText,
});
export type DearHours = z.infer<typeof DearHours>;

const Needed = z.enum([...NEED_KINDS, 'daily-volume', 'flow-hours', 'quiet-hours', 'entry-limit']);

/** A program with an ordinary week of it, Monday 0:00 = `from` 0 in wall-clock ms, and its figures for a mean month. */
export const ProgramFigures = z.object({
  program: MotorSettingsShape.shape.program,
  week: z.array(PlannedRun),
  kwhPerMonth: z.number(),
  costPerMonth: MoneyText,
  gallonsPerDay: z.number(),
  shortfalls: z.array(z.object({ need: Needed, weekdays: z.array(z.number().int()), short: z.number() })),
});
export type ProgramFigures = z.infer<typeof ProgramFigures>;

/**
 * `advice`: a program that does the same for less, or meets what the present one leaves short. `keep`: none does better.
 * `infeasible`: needs that no program can meet, named. `refused`: it could not be asked; `reasons` say what is missing.
 */
export const ADVICE_KINDS = ['advice', 'keep', 'infeasible', 'refused'] as const;

const AdviceHead = z.object({
  pumpId: Id,
  padId: Id,
  padName: z.string(),
  pumpName: z.string(),
  customerName: z.string().nullable(),
  area: z.string().nullable(),
  kind: z.enum(ADVICE_KINDS),
  madeAt: Instant,
  /** 0 = January: prices and needs are those of its season. */
  month: z.number().int(),
  tariffName: z.string().nullable(),
  currency: z.string().nullable(),
  /** Of the present cost, 0.25 = a quarter less; below 0 where meeting the needs costs more; null without a comparison. */
  savedShare: z.number().nullable(),
  savedPerMonth: MoneyText.nullable(),
  savedKwhPerMonth: z.number().nullable(),
});

export const ProgramRow = AdviceHead.extend({
  before: ProgramFigures.nullable(),
  after: ProgramFigures.nullable(),
  /** What runs in dear hours, worst first: program entries and clock windows alike. */
  dearHours: z.array(DearHours),
});
export type ProgramRow = z.infer<typeof ProgramRow>;

export const ProgramAdvice = ProgramRow.extend({
  unmet: z.array(
    z.object({
      need: Needed,
      reason: z.enum([
        'more-than-it-can-move',
        'beyond-top-speed',
        'against-quiet-hours',
        'input-too-slow',
        'too-few-entries',
      ]),
      weekdays: z.array(z.number().int()),
      wanted: z.number(),
      reachable: z.number(),
    }),
  ),
  /** What is missing or wrong, by field, with what is allowed. */
  reasons: z.array(z.object({ field: z.string(), reason: z.string(), allowed: z.string() })),
  /** What the advisor took the pad to need. */
  needs: z
    .object({
      gallonsPerDay: z.number(),
      windows: z.array(
        z.object({
          kind: z.enum(NEED_KINDS),
          days: z.array(z.boolean()).length(7),
          fromMinute: z.number(),
          toMinute: z.number(),
          minimumRpm: z.number().nullable(),
          minimumGpm: z.number().nullable(),
        }),
      ),
    })
    .nullable(),
});
export type ProgramAdvice = z.infer<typeof ProgramAdvice>;

export const ProgramsQuery = z.object({
  /** `costly`: programs that could do the same for a quarter less or more; `dear-hours`: something runs in dear hours. */
  show: z.enum(['costly', 'dear-hours', 'all']).default('costly'),
  q: z.string().trim().max(100).optional(),
  area: z.string().max(60).optional(),
  sort: z.enum(['saved', 'share', 'name']).default('saved'),
  ...pageQuery(100, 25),
});
export type ProgramsQuery = z.infer<typeof ProgramsQuery>;

export const programEndpoints = {
  list: defineEndpoint({
    method: 'GET',
    path: '/api/energy/programs',
    summary: 'Programs and clock windows that cost too much, with what would do the same for less',
    roles: STAFF,
    query: ProgramsQuery,
    response: pageOf(ProgramRow).extend({
      matching: z.number().int(),
      /** Pumps with advice in all, and those still waiting for their first. */
      advised: z.number().int(),
      waiting: z.number().int(),
      serverNow: Instant,
    }),
  }),
  pump: defineEndpoint({
    method: 'GET',
    path: '/api/pumps/:pumpId/advice',
    summary: 'The advice for a pump’s program as it was last worked out; null before the first',
    roles: STAFF,
    params: z.object({ pumpId: Id }),
    response: z.object({ advice: ProgramAdvice.nullable(), serverNow: Instant }),
  }),
};
