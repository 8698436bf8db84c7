import { METER_AS_FITTED } from '../hydraulics/meter-error.ts';
import { calendarMonth } from './calendar-month.ts';
import type { ComparedDay, Use } from './compare-days.ts';
import type { Micros } from './money.ts';
import { type Savings, sigmaOfSavings, stipulatedBy } from './savings.ts';
import type { Baseline } from './savings-baseline.ts';

/** Savings over days of any tariffs. Money is undefined where a day has no tariff or they are of several currencies. */
export type TermSavings = Omit<Savings, 'savedMicros' | 'sigmaMicros' | 'coverageShare'> & {
  readonly savedMicros: Micros | undefined;
  readonly sigmaMicros: Micros | undefined;
};

/** One sigma of the flow meter's water over many runs, as a share; its curve's error does not average out. */
const FLOW_SIGMA_SHARE = 0.1;

type Sums = { before: Use; after: Use };

const NOTHING: Use = { kwh: 0, micros: 0 };
const add = (left: Use, right: Use): Use => ({ kwh: left.kwh + right.kwh, micros: left.micros + right.micros });

/** By calendar month and tariff: within these the errors of both sides are each one. */
function sumStretches(days: readonly ComparedDay[]): Sums[] {
  const stretches = new Map<string, Sums>();
  for (const { epochDay, term, before, after } of days) {
    const { year, month } = calendarMonth(epochDay);
    const key = `${year} ${month} ${term?.id ?? ''}`;
    const sums = stretches.get(key) ?? { before: NOTHING, after: NOTHING };
    stretches.set(key, { before: add(sums.before, before), after: add(sums.after, after) });
  }
  return [...stretches.values()];
}

/**
 * What was saved over compared days; undefined without any. Errors of the baseline and of the meter are the same in every
 * stretch: sigmas add up, they do not cancel.
 *
 * @example sumSavings(baseline, compareDays(baseline, daysOfJuly, terms)) // { savedKwh: 310, savedMicros: 90_000_000, … }
 * Source: IPMVP options A and B, retrofit isolation (from memory).
 */
export function sumSavings(baseline: Baseline, days: readonly ComparedDay[]): TermSavings | undefined {
  if (days.length === 0) return undefined;
  const stretches = sumStretches(days);
  const shares = {
    meter: METER_AS_FITTED.share,
    flow: baseline.basis.kind === 'same-volume' ? FLOW_SIGMA_SHARE : 0,
  };
  const sum = (value: (sums: Sums) => number): number => stretches.reduce((total, sums) => total + value(sums), 0);
  const sigma = (of: keyof Use) =>
    sum(({ before, after }) => sigmaOfSavings(baseline, shares, { before: before[of], after: after[of] }));
  const currencies = new Set(days.map(({ term }) => term?.tariff.currency));
  const isPriced = currencies.size === 1 && !currencies.has(undefined);
  const stipulated = stipulatedBy(baseline);
  return {
    baselineKwh: sum(({ before }) => before.kwh),
    actualKwh: sum(({ after }) => after.kwh),
    savedKwh: sum(({ before, after }) => before.kwh - after.kwh),
    sigmaKwh: sigma('kwh'),
    savedMicros: isPriced ? sum(({ before, after }) => before.micros - after.micros) : undefined,
    sigmaMicros: isPriced ? sigma('micros') : undefined,
    method: stipulated.length === 0 ? 'B' : 'A',
    stipulated,
  };
}
