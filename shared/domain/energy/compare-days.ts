import { groupBy } from '../grouping/group-by.ts';
import { HOUR_MS } from '../time/local-time.ts';
import { calendarMonth } from './calendar-month.ts';
import { checkTariff } from './check-tariff.ts';
import type { HourUsage } from './hour-usage.ts';
import type { Micros } from './money.ts';
import { type DayTerm, type DayUse, termOn } from './price-days.ts';
import { type MonthUse, priceSoundEnergy } from './price-energy.ts';
import { checkBaseline, hoursRatio } from './savings.ts';
import type { Baseline } from './savings-baseline.ts';
import type { HourMatrix, Tariff } from './tariff.ts';

/** What a motor used and cost in some time. */
export type Use = { readonly kwh: number; readonly micros: Micros };

/** A local day as the old motor would have had it, beside what the new one used; both under the day's tariff. */
export type ComparedDay = {
  readonly epochDay: number;
  /** undefined = no tariff was in force: the money is 0. */
  readonly term: DayTerm | undefined;
  readonly before: Use;
  readonly after: Use;
};

const NOUGHT: HourMatrix = Array.from({ length: 12 }, () => Array.from({ length: 24 }, () => 0));
/** Prices nothing: energy alone is compared. */
const FREE: Tariff = {
  name: 'Free',
  currency: 'USD',
  fixedMicrosPerMonth: 0,
  energy: { periods: [[{ rateMicros: 0, adjustmentMicros: 0 }]], weekday: NOUGHT, weekend: NOUGHT },
};

type Stretch = { readonly term: DayTerm | undefined; readonly days: DayUse[] };

/** Days of one calendar month under one tariff. */
function listStretches(days: readonly DayUse[], terms: readonly DayTerm[]): Stretch[] {
  const months = groupBy(days, ({ epochDay }) => {
    const { year, month } = calendarMonth(epochDay);
    return `${year} ${month}`;
  });
  return [...months.values()].flatMap((month) =>
    [...groupBy(month, ({ epochDay }) => termOn(terms, epochDay))].map(([term, own]) => ({ term, days: own })),
  );
}

/** With the same water held equal, only hours of which the water is known count, on both sides. */
const comparable =
  ({ basis }: Baseline) =>
  ({ gallons, turningMs }: HourUsage): boolean =>
    basis.kind === 'same-hours' || turningMs === 0 || gallons > 0;

function compareStretch(
  baseline: Baseline,
  { term, days }: Stretch,
  otherKwhByPeriod: readonly number[],
): ComparedDay[] {
  const tariff = term?.tariff ?? FREE;
  const own = days.map(({ epochDay, hours }) => ({ epochDay, hours: hours.filter(comparable(baseline)) }));
  const usage = own.flatMap(({ hours }) => hours);
  const ratio = usage.some(({ turningMs }) => turningMs > 0) ? hoursRatio(baseline.basis, usage) : undefined;
  if (ratio === undefined || checkTariff(tariff).length > 0) return [];
  const options = term === undefined ? {} : { otherKwhByPeriod };
  let [oldCarried, nowCarried]: (MonthUse | undefined)[] = [];
  return own.map(({ epochDay, hours }) => {
    const wattHours = ({ turningMs }: HourUsage): number => (baseline.watts * ratio * turningMs) / HOUR_MS;
    const old = hours.map((hour) => ({ ...hour, wattHours: wattHours(hour) }));
    const before = priceSoundEnergy(tariff, old, { ...options, carried: oldCarried });
    const after = priceSoundEnergy(tariff, hours, { ...options, carried: nowCarried });
    [oldCarried, nowCarried] = [before.carried, after.carried];
    return { epochDay, term, before: useOf(before), after: useOf(after) };
  });
}

const useOf = ({ kwh, micros }: Use): Use => ({ kwh, micros });

/**
 * What an old motor would have used on local days in order, beside what the new one did, each day under its own tariff and
 * by its month's tiers so far: days of a month add up to the month, so pass whole calendar months. Days of a stretch in
 * which nothing ran, or none of the water is known that is held equal, are left out; so are all days where the baseline is
 * out of range, and those under a tariff with a hole. Energy is finite and from 0.
 *
 * @example compareDays(baseline, daysOfJuly, terms)[0] // { epochDay: 20270, before: { kwh: 13.2, … }, after: { kwh: 3.1, … }, … }
 */
export const compareDays = (
  baseline: Baseline,
  days: readonly DayUse[],
  terms: readonly DayTerm[],
  otherKwhByPeriod: readonly number[] = [],
): ComparedDay[] =>
  checkBaseline(baseline).length > 0
    ? []
    : listStretches(days, terms).flatMap((stretch) => compareStretch(baseline, stretch, otherKwhByPeriod));
