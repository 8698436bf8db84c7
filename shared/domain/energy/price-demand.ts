import { type CalendarMonth, calendarMonth, daysInMonth, isSameMonth } from './calendar-month.ts';
import { chargeTiers } from './charge-tiers.ts';
import type { HourUsage } from './hour-usage.ts';
import type { Micros } from './money.ts';
import { periodAt, type Tariff } from './tariff.ts';

/** The largest mean kW of a month: in one period of the demand schedule, or over all hours (`flat`). */
export type DemandLine = {
  readonly month: CalendarMonth;
  readonly period: number | 'flat';
  readonly kilowatts: number;
  readonly micros: Micros;
};

type Peaks = { readonly month: CalendarMonth; readonly byPeriod: number[]; flat: number };

/** Mean kW of a slice over all of its own length, as a demand meter takes it: a minute's start is not a quarter-hour's load. */
const meanKilowatts = ({ wattHours, from, to }: HourUsage): number => (wattHours * 3600) / (to - from);

function findPeaks(tariff: Tariff, usage: readonly HourUsage[]): Peaks[] {
  const months: Peaks[] = [];
  for (const slice of usage) {
    const month = calendarMonth(slice.epochDay);
    let peaks = months.at(-1);
    if (peaks === undefined || !isSameMonth(peaks.month, month)) {
      peaks = { month, byPeriod: (tariff.demand?.periods ?? []).map(() => 0), flat: 0 };
      months.push(peaks);
    }
    const kilowatts = meanKilowatts(slice);
    const period = tariff.demand && periodAt(tariff.demand, month.month, slice.weekday, slice.hour);
    peaks.flat = Math.max(peaks.flat, kilowatts);
    if (period !== undefined) peaks.byPeriod[period] = Math.max(peaks.byPeriod[period] ?? 0, kilowatts);
  }
  return months;
}

/**
 * What a pump's largest demand costs, by month and period, as if it fell together with the rest of the meter's largest:
 * the most that it can be. Usage in slices of the tariff's demand window (15 minutes as a rule), tariff free of faults
 * (`checkTariff`). Empty where the tariff has no demand price. Money in micros, not rounded.
 *
 * @example priceDemand(tariff, quarterHours) // [{ month, period: 0, kilowatts: 1.6, micros: 12_800_000 }]
 * Source: open rate-schedule shape, demandratestructure and flatdemandstructure.
 */
export function priceDemand(tariff: Tariff, usage: readonly HourUsage[]): DemandLine[] {
  if (tariff.demand === undefined && tariff.flatDemand === undefined) return [];
  return findPeaks(tariff, usage).flatMap(({ month, byPeriod, flat }): DemandLine[] => {
    const days = daysInMonth(month);
    const lines: DemandLine[] = byPeriod.flatMap((kilowatts, period) => {
      const micros = chargeTiers(tariff.demand?.periods[period] ?? [], kilowatts, days);
      return kilowatts > 0 ? [{ month, period, kilowatts, micros }] : [];
    });
    const flatPeriod = tariff.flatDemand?.months[month.month];
    const tiers = flatPeriod === undefined ? undefined : tariff.flatDemand?.periods[flatPeriod];
    if (tiers !== undefined && flat > 0)
      lines.push({ month, period: 'flat', kilowatts: flat, micros: chargeTiers(tiers, flat, days) });
    return lines;
  });
}
