import { planWeek } from '../energy/plan-week.ts';
import { type AdviceRequest, layOutDays, termsOf } from './advice-request.ts';
import { checkAdviceRequest } from './check-advice-request.ts';
import { leastCostPerWeek } from './choose-program.ts';
import { groupDays } from './combine-days.ts';
import { figuresOfWeek } from './week-figures.ts';

/**
 * The most that any program could save of the present cost, as a share: 1 less the relaxed program's cost with what
 * inputs and standby take anyway. It takes milliseconds, so a fleet is sifted with it before programs are searched: a
 * pump under the share that is worth a word needs no search. undefined for a request with faults, needs out of reach, or
 * a present cost that is not above 0.
 *
 * @example mostSavedShare(request) // 0.83
 */
export function mostSavedShare(request: AdviceRequest): number | undefined {
  if (checkAdviceRequest(request).length > 0) return undefined;
  const { settings, traits, windows, tariff } = request;
  const terms = termsOf(request);
  const least = leastCostPerWeek(groupDays(layOutDays(request, terms).days));
  const costOf = (changed: typeof settings): number =>
    figuresOfWeek(planWeek(changed, traits, windows), { ...terms, currency: tariff.currency }).microsPerWeek;
  const before = costOf(settings);
  if (least === undefined || !(before > 0)) return undefined;
  return 1 - (least + costOf({ ...settings, program: [], prime: null })) / before;
}
