import type { Micros } from './money.ts';
import { toMinorUnits } from './money.ts';
import { type DayTerm, type PricedDay, periodName } from './price-days.ts';

/** One period of a bill, by the tariff that priced it; `period` undefined = the demand charge. */
export type BillLine = {
  readonly tariffId: string;
  readonly period: number | undefined;
  readonly name: string;
  readonly kwh: number;
  readonly micros: Micros;
};

/**
 * What some days come to. `currency` and `minorUnits` are undefined where a day with use has no tariff, or its tariffs are of
 * several currencies.
 */
export type Bill = {
  readonly currency: string | undefined;
  readonly minorUnits: number | undefined;
  readonly lines: readonly BillLine[];
};

/** What a demand charge is called among the periods. */
export const DEMAND_NAME = 'Demand';

function addDay(lines: Map<string, BillLine>, day: PricedDay, { id, tariff }: DayTerm): void {
  const add = (period: number | undefined, name: string, kwh: number, micros: Micros): void => {
    const key = `${id} ${period ?? 'demand'}`;
    const known = lines.get(key);
    lines.set(key, {
      tariffId: id,
      period,
      name,
      kwh: kwh + (known?.kwh ?? 0),
      micros: micros + (known?.micros ?? 0),
    });
  };
  for (const [period, kwh] of day.kwhByPeriod.entries())
    add(period, periodName(tariff, period), kwh, day.energyMicrosByPeriod[period] ?? 0);
  if (day.demandMicros !== 0) add(undefined, DEMAND_NAME, 0, day.demandMicros);
}

/**
 * Draws priced days of one calendar month up as a bill: its lines by tariff and period, and the sum in whole minor units,
 * rounded once.
 *
 * @example billOf(priceDays(daysOfJuly, terms)).minorUnits // 6160
 */
export function billOf(days: readonly PricedDay[]): Bill {
  const lines = new Map<string, BillLine>();
  const currencies = new Set<string>();
  for (const day of days) {
    if (day.term !== undefined) {
      addDay(lines, day, day.term);
      currencies.add(day.term.tariff.currency);
    }
  }
  const isWhole = days.every(({ term, kwh }) => term !== undefined || kwh === 0);
  const [currency] = currencies;
  const isPriced = isWhole && currencies.size === 1 && currency !== undefined;
  const micros = days.reduce((sum, day) => sum + day.micros, 0);
  return {
    currency: isPriced ? currency : undefined,
    minorUnits: isPriced ? toMinorUnits(micros, currency) : undefined,
    lines: [...lines.values()],
  };
}
