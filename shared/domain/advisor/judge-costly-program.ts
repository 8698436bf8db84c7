import type { PadState } from '../control/pump-context.ts';
import { PAD_STATE_MUTES } from '../detectors/context-mutes.data.ts';
import type { AlarmSignal } from '../detectors/detector.ts';
import { DETECTOR_CLASSES } from '../detectors/detector-classes.data.ts';
import { toMinorUnits } from '../energy/money.ts';
import { formatMinor } from '../energy/money-text.ts';
import { DAY_MS } from '../time/local-time.ts';
import { WEEKS_PER_YEAR } from '../time/mean-year.ts';
import type { Advice, ProgramPlan } from './advise-program.ts';
import type { KeptAdvice } from './advise-pump.ts';
import { costlyProgramCause } from './costly-program-cause.ts';

/** What is remembered between days, plain JSON: local day and saved share of each, and when the note was raised, ms. */
export type CostlyMemory = {
  readonly days: readonly (readonly [localDay: number, savedShare: number])[];
  readonly raisedAt: number | null;
};

/**
 * The advisor's word of one day about a pump: `localDay` counts from 1970, `at` is when it was worked out, ms, `currency`
 * (ISO 4217) is the tariff's.
 */
export type DailyAdvice = {
  readonly advice: Advice | KeptAdvice;
  readonly currency: string;
  readonly localDay: number;
  readonly at: number;
  readonly padState: PadState;
};

/**
 * Share saved, days it must hold, how many of them must have been judged, and what the share must be worth, in kWh a year
 * at the pad's own mean price: a note asks for a technician's time and a customer's yes, and most programs could do
 * with a little less. Lesser savings stay on the list of programs. Common practice.
 */
export const COSTLY_PROGRAM = {
  savedShare: 0.25,
  deadbandShare: 0.25,
  days: 14,
  leastDays: 12,
  leastKwhPerYear: 1000,
} as const;

export type CostlyJudgement = { readonly memory: CostlyMemory; readonly signal: AlarmSignal | undefined };

export const NO_COSTLY_MEMORY: CostlyMemory = { days: [], raisedAt: null };

/**
 * `costly-program`, once a day for a pump with a tariff and hydraulics, outside the fold: working a program out takes
 * a thousand times as long as a reading. Raises when the advisor did the same duty for a quarter less over fourteen
 * days, clears when less than three quarters of that are left to save. A day without a comparison counts for nothing;
 * a program changed for the better ends it at once.
 *
 * @example judgeCostlyProgram(memory, { advice, localDay, at, padState: 'open' }).signal?.type // 'raised'
 */
export function judgeCostlyProgram(
  memory: CostlyMemory,
  today: DailyAdvice,
  limits: { readonly [Key in keyof typeof COSTLY_PROGRAM]: number } = COSTLY_PROGRAM,
): CostlyJudgement {
  const { advice, localDay, at, padState } = today;
  if (PAD_STATE_MUTES[padState].includes('costly-program')) return over({ days: [], raisedAt: memory.raisedAt }, at);
  if (advice.kind === 'refused' || advice.kind === 'infeasible') return { memory, signal: undefined };
  const savedShare = advice.kind === 'keep' ? 0 : advice.savedShare;
  if (!Number.isFinite(savedShare)) return { memory, signal: undefined };
  const kept = memory.days.filter(([day]) => day > localDay - limits.days && day !== localDay);
  const days = [...kept, [localDay, Math.round(savedShare * 1000) / 1000] as const];
  const mean = days.reduce((sum, [, share]) => sum + share, 0) / days.length;
  const left = limits.savedShare * (1 - limits.deadbandShare);
  if (memory.raisedAt !== null && savedShare < left) return over({ days, raisedAt: memory.raisedAt }, at);
  const isWorth = mean * advice.before.kwhPerWeek * WEEKS_PER_YEAR >= limits.leastKwhPerYear;
  const isDear = days.length >= limits.leastDays && mean >= limits.savedShare && isWorth;
  const raises = memory.raisedAt === null && isDear;
  // What was dear once and is put right today is no news.
  if (!raises || savedShare < left) return { memory: { days, raisedAt: memory.raisedAt }, signal: undefined };
  const from = at - (localDay - (days[0]?.[0] ?? localDay)) * DAY_MS;
  const signal = raisedSignal(today, {
    before: advice.before,
    after: advice.after,
    saving: mean,
    days: days.length,
    from,
  });
  return { memory: { days, raisedAt: at }, signal };
}

function over({ days, raisedAt }: CostlyMemory, at: number): CostlyJudgement {
  const signal = { type: 'cleared', detector: 'costly-program', at, evidence: { normalSince: at } } as const;
  return { memory: { days, raisedAt: null }, signal: raisedAt === null ? undefined : signal };
}

type Finding = {
  readonly before: ProgramPlan;
  readonly after: ProgramPlan;
  readonly saving: number;
  readonly days: number;
  readonly from: number;
};

function raisedSignal({ currency, at }: DailyAdvice, { before, after, saving, days, from }: Finding): AlarmSignal {
  const costOf = ({ microsPerWeek }: ProgramPlan) =>
    formatMinor(toMinorUnits(microsPerWeek * WEEKS_PER_YEAR, currency) ?? 0, currency);
  return {
    type: 'raised',
    detector: 'costly-program',
    ...DETECTOR_CLASSES['costly-program'],
    from,
    at,
    cause: costlyProgramCause(before, after),
    evidence: {
      saving: Math.round(saving * 100) / 100,
      daysJudged: days,
      currency,
      costPerYearBefore: costOf(before),
      costPerYearAfter: costOf(after),
      kwhPerYearBefore: Math.round(before.kwhPerWeek * WEEKS_PER_YEAR),
      kwhPerYearAfter: Math.round(after.kwhPerWeek * WEEKS_PER_YEAR),
      gallonsPerWeekBefore: Math.round(before.gallonsPerWeek),
      gallonsPerWeekAfter: Math.round(after.gallonsPerWeek),
    },
  };
}
