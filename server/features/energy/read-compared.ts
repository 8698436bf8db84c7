import { epochDayOf, monthStart } from '#server/db/day-text.ts';
import type { PadPrices } from '#server/db/tariffs-in-force.ts';
import { type ComparedDay, compareDays } from '#shared/domain/energy/compare-days.ts';
import { type DayTerm, type DayUse, termOn } from '#shared/domain/energy/price-days.ts';
import type { Baseline } from '#shared/domain/energy/savings-baseline.ts';
import type { EnergyDay } from './energy-read-model.ts';

/** Days of whole calendar months of a pump, and the hours of those months whose stored comparison is out of date. */
export type DaysToCompare = {
  readonly days: readonly EnergyDay[];
  readonly uses: readonly DayUse[];
  /** First days of the months that are compared from `uses`. */
  readonly incomparable: ReadonlySet<string>;
};

/** A pump's days beside what the motor before would have used: as they are stored, and worked out where that is out of date. */
export function readCompared(
  { days, uses, incomparable }: DaysToCompare,
  baseline: Baseline,
  { terms, otherKwhByPeriod }: PadPrices,
): ComparedDay[] {
  const isStored = (epochDay: number): boolean => !incomparable.has(monthStart(epochDay));
  const stored = days.filter(({ day }) => isStored(epochDayOf(day))).flatMap((day) => toCompared(day, terms) ?? []);
  const fresh = uses.filter(({ epochDay }) => !isStored(epochDay));
  return [...stored, ...compareDays(baseline, fresh, terms, otherKwhByPeriod)];
}

function toCompared(
  { day, beforeKwh, beforeMicros, afterKwh, afterMicros }: EnergyDay,
  terms: readonly DayTerm[],
): ComparedDay | undefined {
  if (beforeKwh === null || beforeMicros === null || afterKwh === null || afterMicros === null) return undefined;
  const epochDay = epochDayOf(day);
  const before = { kwh: beforeKwh, micros: beforeMicros };
  return { epochDay, term: termOn(terms, epochDay), before, after: { kwh: afterKwh, micros: afterMicros } };
}
