import type { PumpContext } from '../control/pump-context.ts';
import type { Micros } from '../energy/money.ts';
import { planWeek } from '../energy/plan-week.ts';
import { checkTimeOfUse, type TimeOfUseFinding } from '../energy/time-of-use-check.ts';
import type { Refusal } from '../refusal/refusal.ts';
import { WEEKS_PER_MONTH } from '../time/mean-year.ts';
import type { AdviceRequest } from './advice-request.ts';
import { type Advice, adviseProgram } from './advise-program.ts';
import type { PadNeeds } from './pad-needs.ts';
import { type AdviceTerms, requestOfPump } from './request-of-pump.ts';
import { speedOptionAt } from './speed-option.ts';

/** Advice as it is kept; what could not be asked says what is missing. */
export type KeptAdvice =
  | Exclude<Advice, { readonly kind: 'refused' }>
  | { readonly kind: 'refused'; readonly refusals: readonly Refusal[] };

/** The advisor's word on a pump: its program, and what its program and its clocks run in dear hours. */
export type PumpAdvice = {
  readonly advice: KeptAdvice;
  readonly needs: PadNeeds | undefined;
  readonly dearHours: readonly TimeOfUseFinding[];
  /** Below 0 where meeting the needs costs more; undefined without a comparison. */
  readonly savedMicrosPerMonth: Micros | undefined;
  readonly savedShare: number | undefined;
};

function findDearHours({ settings, traits, windows, curve, system, tariff }: AdviceRequest): TimeOfUseFinding[] {
  const week = planWeek(settings, traits, windows);
  return checkTimeOfUse(tariff, week, (rpm) => speedOptionAt(curve, system, rpm)?.watts);
}

/**
 * Advises a pump's program from what is commissioned and the tariff of its pad in a month.
 *
 * @example advisePump(context, { tariff, month: 6 }).savedShare // 0.41
 */
export function advisePump(context: PumpContext, terms: AdviceTerms): PumpAdvice {
  const request = requestOfPump(context, terms);
  const nothing = { needs: undefined, dearHours: [], savedMicrosPerMonth: undefined, savedShare: undefined };
  if (!request.ok) return { ...nothing, advice: { kind: 'refused', refusals: request.refusals } };
  const { needs } = request.value;
  const advice = adviseProgram(request.value);
  if (advice.kind === 'refused') return { ...nothing, needs, advice: { kind: 'refused', refusals: advice.refusals } };
  const dearHours = findDearHours(request.value);
  if (advice.kind === 'infeasible') return { ...nothing, needs, dearHours, advice };
  const keeps = advice.kind === 'keep';
  const perWeek = keeps ? 0 : advice.before.microsPerWeek - advice.after.microsPerWeek;
  return {
    advice,
    needs,
    dearHours,
    savedMicrosPerMonth: perWeek * WEEKS_PER_MONTH,
    savedShare: keeps ? 0 : advice.savedShare,
  };
}
