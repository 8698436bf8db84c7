import { epochDayOf, monthStart } from '#server/db/day-text.ts';
import type { PadPrices } from '#server/db/tariffs-in-force.ts';
import { apportionMinorUnits } from '#shared/domain/energy/money.ts';
import { type DayUse, type PricedDay, periodName, priceDays, termOn } from '#shared/domain/energy/price-days.ts';
import { groupBy } from '#shared/domain/grouping/group-by.ts';
import type { EnergyDay } from './energy-read-model.ts';

/** A day's price settled in cents: the days of a calendar month add up to the month to the cent. */
export type SettledDay = PricedDay & {
  /** Whole minor units; undefined without a tariff where something was used. */
  readonly minorUnits: number | undefined;
  readonly currency: string | undefined;
};

/** Days of whole calendar months of a pump, and the hours of those months whose stored prices are out of date. */
export type DaysToReckon = {
  readonly days: readonly EnergyDay[];
  readonly uses: readonly DayUse[];
  /** First days of the months that are priced from `uses`. */
  readonly outdated: ReadonlySet<string>;
};

const monthOf = ({ epochDay }: { readonly epochDay: number }): string => monthStart(epochDay);

/** Prices whole calendar months of a pump, from their stored prices where these are up to date, and settles each in cents. */
export function reckonDays({ days, uses, outdated }: DaysToReckon, prices: PadPrices): ReadonlyMap<number, SettledDay> {
  const stored = days.map((day) => toPriced(day, prices)).filter((day) => !outdated.has(monthOf(day)));
  const fresh = priceDays(
    uses.filter((use) => outdated.has(monthOf(use))),
    prices.terms,
    prices,
  );
  const months = groupBy([...stored, ...fresh], (day) => `${monthOf(day)} ${day.term?.tariff.currency ?? ''}`);
  const byDay = new Map<number, SettledDay>();
  for (const month of months.values()) for (const day of settle(month)) byDay.set(day.epochDay, day);
  return byDay;
}

/** What a stored day says of its price. */
function toPriced(day: EnergyDay, { terms }: PadPrices): PricedDay {
  const { kwhByPeriod, energyMicrosByPeriod, demandMicros } = day;
  const epochDay = epochDayOf(day.day);
  const sum = (values: readonly number[]): number => values.reduce((total, value) => total + value, 0);
  // Without a tariff that priced it a day has no periods.
  const term = kwhByPeriod.length === 0 ? undefined : termOn(terms, epochDay);
  const kwh = term === undefined ? day.wattHours / 1000 : sum(kwhByPeriod);
  const micros = sum(energyMicrosByPeriod) + demandMicros;
  return { epochDay, term, kwh, kwhByPeriod, energyMicrosByPeriod, demandMicros, micros };
}

function settle(days: readonly PricedDay[]): SettledDay[] {
  const currency = days[0]?.term?.tariff.currency;
  const parts = days.map(({ micros }) => micros);
  const minor = currency === undefined ? undefined : apportionMinorUnits(parts, currency);
  return days.map((day, index) => ({
    ...day,
    currency,
    minorUnits: minor?.[index] ?? (day.kwh === 0 ? 0 : undefined),
  }));
}

/** Names of the periods of priced days, in the order in which their tariffs list them; a name stands once. */
export function listPeriodNames(days: Iterable<SettledDay>): string[] {
  const names = new Set<string>();
  for (const { term } of days) {
    if (term === undefined) continue;
    for (const period of term.tariff.energy.periods.keys()) names.add(periodName(term.tariff, period));
  }
  return [...names];
}
