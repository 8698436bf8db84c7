import { wattHoursToKilowattHours } from '#shared/units/energy.ts';
import { accepted, type Outcome, type Refusal, refused } from '../refusal/refusal.ts';
import { type CalendarMonth, calendarMonth, daysInMonth, isSameMonth } from './calendar-month.ts';
import { chargeTiers } from './charge-tiers.ts';
import { checkTariff, type TariffFault } from './check-tariff.ts';
import type { HourUsage } from './hour-usage.ts';
import type { Micros } from './money.ts';
import { periodAt, type Tariff } from './tariff.ts';

/** The energy of one period of one calendar month, and what it costs. */
export type EnergyLine = {
  readonly month: CalendarMonth;
  readonly period: number;
  readonly kwh: number;
  readonly micros: Micros;
};

/** How far a month's tiers are used: kWh by period since the month began. Pass it on to price the next stretch. */
export type MonthUse = { readonly month: CalendarMonth; readonly kwhByPeriod: readonly number[] };

export type PricedEnergy = {
  readonly lines: readonly EnergyLine[];
  readonly kwh: number;
  readonly micros: Micros;
  readonly carried: MonthUse | undefined;
};

export type PricingFault = TariffFault | 'usage-not-finite';

export type PricingOptions = {
  /** What this month has used before this stretch, from the stretch before it. */
  readonly carried?: MonthUse | undefined;
  /**
   * What the rest of the meter uses a month, kWh by period: the pump's tiers start above it. Without it they start at
   * the pump's own first kWh.
   */
  readonly otherKwhByPeriod?: readonly number[] | undefined;
};

type UsedHour = Pick<HourUsage, 'epochDay' | 'weekday' | 'hour' | 'wattHours'>;

type MonthSum = { readonly month: CalendarMonth; readonly kwh: number[]; readonly before: readonly number[] };

/** Adds the hours up by month and period; the tiers of a month go by its whole use, whatever the order of its hours. */
function sumMonths(tariff: Tariff, usage: readonly UsedHour[], carried: MonthUse | undefined): MonthSum[] {
  const sums: MonthSum[] = [];
  for (const used of usage) {
    const month = calendarMonth(used.epochDay);
    let sum = sums.at(-1);
    if (sum === undefined || !isSameMonth(sum.month, month)) {
      const before = carried !== undefined && isSameMonth(carried.month, month) ? carried.kwhByPeriod : [];
      sum = { month, kwh: tariff.energy.periods.map(() => 0), before };
      sums.push(sum);
    }
    const period = periodAt(tariff.energy, month.month, used.weekday, used.hour) ?? 0;
    sum.kwh[period] = (sum.kwh[period] ?? 0) + wattHoursToKilowattHours(used.wattHours);
  }
  return sums;
}

function priceMonth(tariff: Tariff, sum: MonthSum, other: readonly number[]): EnergyLine[] {
  const days = daysInMonth(sum.month);
  const extra = tariff.monthlyAdjustmentMicros?.[sum.month.month] ?? 0;
  return sum.kwh.flatMap((kwh, period) => {
    if (kwh === 0) return [];
    const tiers = tariff.energy.periods[period] ?? [];
    const start = (other[period] ?? 0) + (sum.before[period] ?? 0);
    const micros = chargeTiers(tiers, start + kwh, days, extra) - chargeTiers(tiers, start, days, extra);
    return [{ month: sum.month, period, kwh, micros }];
  });
}

const isAmount = (value: number): boolean => Number.isFinite(value) && value >= 0;

function checkPricing(tariff: Tariff, usage: readonly UsedHour[], options: PricingOptions): Refusal<PricingFault>[] {
  const faults: Refusal<PricingFault>[] = checkTariff(tariff);
  const wrong = usage.findIndex(({ wattHours, epochDay }) => !isAmount(wattHours) || !Number.isInteger(epochDay));
  const allowed = 'finite watt-hours from 0 on a calendar day';
  if (wrong >= 0) faults.push({ reason: 'usage-not-finite', field: `usage[${wrong}].wattHours`, allowed });
  const others = [...(options.otherKwhByPeriod ?? []), ...(options.carried?.kwhByPeriod ?? [])];
  if (!others.every(isAmount))
    faults.push({ reason: 'usage-not-finite', field: 'options', allowed: 'finite kWh from 0 in each period' });
  return faults;
}

/**
 * Prices energy used hour by hour (watt-hours in wall-clock hours, in order) under a tariff: tiers by the use of the
 * calendar month, periods by month, weekday or weekend, and hour, with the month's adjustment. Money in micros, not
 * rounded. A stretch priced in parts, each given what the part before it carried, costs the same. Refuses a tariff with
 * a hole, and use that is negative or not finite, by name.
 *
 * @example priceEnergy(tariff, usage) // { ok: true, value: { kwh: 212.4, micros: 61_596_000, lines: […], carried } }
 * Source: open rate-schedule shape; calendar months stand for billing months.
 */
export function priceEnergy(
  tariff: Tariff,
  usage: readonly UsedHour[],
  options: PricingOptions = {},
): Outcome<PricedEnergy, PricingFault> {
  const faults = checkPricing(tariff, usage, options);
  return faults.length > 0 ? refused(faults) : accepted(priceSoundEnergy(tariff, usage, options));
}

/**
 * The same for a tariff and a use that were checked before: what prices many days of one tariff checks them once.
 *
 * @example checkTariff(tariff).length === 0 && priceSoundEnergy(tariff, usage).micros // 61_596_000
 */
export function priceSoundEnergy(
  tariff: Tariff,
  usage: readonly UsedHour[],
  options: PricingOptions = {},
): PricedEnergy {
  const sums = sumMonths(tariff, usage, options.carried);
  const lines = sums.flatMap((sum) => priceMonth(tariff, sum, options.otherKwhByPeriod ?? []));
  const last = sums.at(-1);
  const carried =
    last === undefined
      ? options.carried
      : { month: last.month, kwhByPeriod: last.kwh.map((kwh, period) => kwh + (last.before[period] ?? 0)) };
  return {
    lines,
    kwh: lines.reduce((sum, line) => sum + line.kwh, 0),
    micros: lines.reduce((sum, line) => sum + line.micros, 0),
    carried,
  };
}
