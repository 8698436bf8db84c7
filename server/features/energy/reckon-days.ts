import { monthStart } from '#server/db/day-text.ts';
import { type StoredHours, toDayUse } from '#server/db/stored-days.ts';
import type { PadPrices } from '#server/db/tariffs-in-force.ts';
import { apportionMinorUnits } from '#shared/domain/energy/money.ts';
import { type DayUse, type PricedDay, periodName, priceDays } from '#shared/domain/energy/price-days.ts';

/** A day's price settled in cents: the days of a calendar month add up to the month to the cent. */
export type SettledDay = PricedDay & {
  /** Whole minor units; undefined without a tariff where something was used. */
  readonly minorUnits: number | undefined;
  readonly currency: string | undefined;
};

export type ReckonedDays = {
  readonly uses: readonly DayUse[];
  readonly byDay: ReadonlyMap<number, SettledDay>;
};

/** Prices whole calendar months of a pump and settles each of them in cents. */
export function reckonDays(zone: string, stored: readonly StoredHours[], prices: PadPrices): ReckonedDays {
  const uses = stored.map((day) => toDayUse(zone, day));
  const months = new Map<string, PricedDay[]>();
  for (const priced of priceDays(uses, prices.terms, prices)) {
    const key = `${monthStart(priced.epochDay)} ${priced.term?.tariff.currency ?? ''}`;
    const month = months.get(key) ?? [];
    month.push(priced);
    months.set(key, month);
  }
  const byDay = new Map<number, SettledDay>();
  for (const month of months.values()) for (const day of settle(month)) byDay.set(day.epochDay, day);
  return { uses, byDay };
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
