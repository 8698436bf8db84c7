import type { ProgramEntry } from '../control/motor-settings.ts';
import type { PlannedRun } from '../control/plan.ts';
import type { Micros } from '../energy/money.ts';
import { planWeek } from '../energy/plan-week.ts';
import { type Refused, refused } from '../refusal/refusal.ts';
import { type AdviceRequest, layOutDays, termsOf } from './advice-request.ts';
import { checkAdviceRequest, type RequestFault } from './check-advice-request.ts';
import { chooseProgram, leastCostPerWeek } from './choose-program.ts';
import { groupDays } from './combine-days.ts';
import type { DayTerms } from './day-problem.ts';
import { findShortfalls, type Shortfall } from './find-shortfalls.ts';
import { findUnmetNeeds } from './find-unmet-needs.ts';
import type { UnmetNeed } from './pad-needs.ts';
import { figuresOfWeek, type WeekFigures } from './week-figures.ts';
import { speedsOfWeek, type WeekMinutes } from './week-minutes.ts';

/** A program, an ordinary week of it, its figures, and what it leaves short. */
export type ProgramPlan = WeekFigures & {
  readonly program: readonly ProgramEntry[];
  readonly week: readonly PlannedRun[];
  readonly shortfalls: readonly Shortfall[];
};

/**
 * The advisor's answer. `advice`: a program that meets every need and costs less than the present one, or meets what
 * that one leaves short; `keep`: none does better. `savedShare` is of the present cost, below 0 where meeting the needs
 * costs more. `leastMicrosPerWeek` is what no program at all can go under, the inputs' own share left out. `infeasible`
 * names the needs.
 */
export type Advice =
  | {
      readonly kind: 'advice' | 'keep';
      readonly before: ProgramPlan;
      readonly after: ProgramPlan;
      readonly savedShare: number;
      readonly leastMicrosPerWeek: Micros;
      readonly proved: boolean;
    }
  | { readonly kind: 'infeasible'; readonly before: ProgramPlan; readonly unmet: readonly UnmetNeed[] }
  | ({ readonly kind: 'refused' } & Refused<RequestFault>);

function planOf(
  request: AdviceRequest,
  terms: DayTerms,
  inputs: WeekMinutes,
  program: readonly ProgramEntry[],
): ProgramPlan {
  const { settings, traits, windows, needs, tariff } = request;
  const week = planWeek({ ...settings, program }, traits, windows);
  return {
    program,
    week,
    ...figuresOfWeek(week, { ...terms, currency: tariff.currency }),
    shortfalls: findShortfalls(speedsOfWeek(week), inputs, needs, terms.speedAt),
  };
}

/**
 * Advises the cheapest program that meets a pad's needs under its tariff: water every day, minimum speeds and flows in
 * their windows, the booster with half an hour on each side, quiet hours, and no more entries than the motor holds, on a
 * grid of a quarter-hour. Before and after are an ordinary week each, as the motor would run it, primes and closed
 * inputs included. Demand charges are not weighed. Advice only: a person decides.
 *
 * @example adviseProgram(request) // { kind: 'advice', savedShare: 0.41, before: { kwhPerWeek: 71, … }, after: { kwhPerWeek: 38, … } }
 */
export function adviseProgram(request: AdviceRequest): Advice {
  const faults = checkAdviceRequest(request);
  if (faults.length > 0) return { kind: 'refused', ...refused(faults) };
  const { settings, needs, entryLimit } = request;
  const terms = termsOf(request);
  const { days, inputs } = layOutDays(request, terms);
  const before = planOf(request, terms, inputs, settings.program);
  const unmet = findUnmetNeeds(terms, needs, days, inputs);
  if (unmet.length > 0) return { kind: 'infeasible', before, unmet };
  const groups = groupDays(days);
  const chosen = chooseProgram(groups, terms.speeds, entryLimit);
  if (chosen === undefined) {
    const weekdays = days.map(({ weekday }) => weekday);
    const entries = { need: 'entry-limit', reason: 'too-few-entries', weekdays } as const;
    return { kind: 'infeasible', before, unmet: [{ ...entries, wanted: entryLimit + 1, reachable: entryLimit }] };
  }
  const after = planOf(request, terms, inputs, chosen.entries);
  const savedShare = before.microsPerWeek > 0 ? 1 - after.microsPerWeek / before.microsPerWeek : 0;
  const better = before.shortfalls.length > 0 || after.microsPerWeek < before.microsPerWeek;
  const leastMicrosPerWeek = leastCostPerWeek(groups) ?? 0;
  return { kind: better ? 'advice' : 'keep', before, after, savedShare, leastMicrosPerWeek, proved: chosen.proved };
}
