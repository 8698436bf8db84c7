import { METER_AS_FITTED } from '../hydraulics/meter-error.ts';
import type { Micros } from './money.ts';
import { type DayTerm, type DayUse, termOn } from './price-days.ts';
import { computeSavings, type Savings } from './savings.ts';
import type { Baseline } from './savings-baseline.ts';
import type { HourMatrix, Tariff } from './tariff.ts';

/** Savings over days of any tariffs. Money is undefined where a day has no tariff or they are of several currencies. */
export type TermSavings = Omit<Savings, 'savedMicros' | 'sigmaMicros'> & {
  readonly savedMicros: Micros | undefined;
  readonly sigmaMicros: Micros | undefined;
};

export type SavingsByTerms =
  | ({ readonly ok: true } & TermSavings)
  | { readonly ok: false; readonly missing: 'no-water' | 'nothing-yet' };

const NOUGHT: HourMatrix = Array.from({ length: 12 }, () => Array.from({ length: 24 }, () => 0));
/** Prices nothing: energy alone is compared. */
const FREE: Tariff = {
  name: 'Free',
  currency: 'USD',
  fixedMicrosPerMonth: 0,
  energy: { periods: [[{ rateMicros: 0, adjustmentMicros: 0 }]], weekday: NOUGHT, weekend: NOUGHT },
};
/** One sigma of the flow meter's water over many runs, as a share; its curve's error does not average out. */
const FLOW_SIGMA_SHARE = 0.1;

function groupByTerm(days: readonly DayUse[], terms: readonly DayTerm[]): Map<DayTerm | undefined, DayUse[]> {
  const groups = new Map<DayTerm | undefined, DayUse[]>();
  for (const day of days) {
    const term = termOn(terms, day.epochDay);
    groups.set(term, [...(groups.get(term) ?? []), day]);
  }
  return groups;
}

type Part = { readonly savings: Savings; readonly term: DayTerm | undefined };

/**
 * What was saved over local days of one calendar month against a baseline, each day under its own tariff. Errors of the
 * baseline and of the meter are the same every day: sigmas add up, they do not cancel. With the same water held equal, only
 * hours of which the water is known count, on both sides.
 *
 * @example saveByTerms(baseline, daysOfJuly, terms) // { ok: true, savedKwh: 310, savedMicros: 90_000_000, … }
 */
export function saveByTerms(
  baseline: Baseline,
  days: readonly DayUse[],
  terms: readonly DayTerm[],
  otherKwhByPeriod: readonly number[] = [],
): SavingsByTerms {
  const isByVolume = baseline.basis.kind === 'same-volume';
  const parts: Part[] = [];
  for (const [term, own] of groupByTerm(days, terms)) {
    const usage = own.flatMap(({ hours }) =>
      hours.filter(({ gallons, turningMs }) => !isByVolume || turningMs === 0 || gallons > 0),
    );
    if (!usage.some(({ turningMs }) => turningMs > 0)) continue;
    const actual = { usage, meterSigmaShare: METER_AS_FITTED.share, flowSigmaShare: isByVolume ? FLOW_SIGMA_SHARE : 0 };
    const outcome = computeSavings(
      baseline,
      actual,
      term?.tariff ?? FREE,
      term === undefined ? {} : { otherKwhByPeriod },
    );
    if (outcome.ok) parts.push({ savings: outcome.value, term });
  }
  const [first] = parts;
  if (first === undefined) {
    const ran = days.some(({ hours }) => hours.some(({ turningMs }) => turningMs > 0));
    return { ok: false, missing: isByVolume && ran ? 'no-water' : 'nothing-yet' };
  }
  return { ok: true, ...addParts(first, parts, days) };
}

function addParts(first: Part, parts: readonly Part[], days: readonly DayUse[]): TermSavings {
  const sum = (value: (savings: Savings) => number): number =>
    parts.reduce((total, { savings }) => total + value(savings), 0);
  const currencies = new Set(parts.map(({ term }) => term?.tariff.currency));
  const isPriced = currencies.size === 1 && !currencies.has(undefined);
  const hours = days.flatMap((day) => day.hours);
  const span = hours.reduce((total, { from, to }) => total + to - from, 0);
  return {
    ...first.savings,
    baselineKwh: sum(({ baselineKwh }) => baselineKwh),
    actualKwh: sum(({ actualKwh }) => actualKwh),
    savedKwh: sum(({ savedKwh }) => savedKwh),
    sigmaKwh: sum(({ sigmaKwh }) => sigmaKwh),
    savedMicros: isPriced ? sum(({ savedMicros }) => savedMicros) : undefined,
    sigmaMicros: isPriced ? sum(({ sigmaMicros }) => sigmaMicros) : undefined,
    coverageShare: span > 0 ? hours.reduce((total, { coveredMs }) => total + coveredMs, 0) / span : 0,
  };
}
