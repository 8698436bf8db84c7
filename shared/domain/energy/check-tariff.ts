import { checkNumber, checkNumbers, type NumberFault } from '../refusal/check-number.ts';
import type { Refusal } from '../refusal/refusal.ts';
import type { HourMatrix, RateSchedule, RateTier, Tariff } from './tariff.ts';

export type TariffFault =
  | NumberFault
  | 'no-currency'
  | 'no-name'
  | 'no-periods'
  | 'hole-in-schedule'
  | 'unknown-period'
  | 'hole-above-last-tier'
  | 'tiers-not-rising'
  | 'not-twelve-months';

const MONTHS = 12;
const HOURS = 24;
/** A kWh for more than this, in micros, was typed in another unit. */
const LARGEST_RATE = 1_000_000_000;

const fault = (reason: TariffFault, field: string, allowed: string): Refusal<TariffFault> => ({
  reason,
  field,
  allowed,
});

function checkTiers(tiers: readonly RateTier[], field: string): Refusal<TariffFault>[] {
  if (tiers.length === 0) return [fault('no-periods', field, 'at least one tier with a price')];
  return tiers.flatMap((tier, index) => {
    const at = `${field}[${index}]`;
    const rate = { unit: 'micros', least: -LARGEST_RATE, most: LARGEST_RATE };
    const faults: Refusal<TariffFault>[] = checkNumbers([
      [tier.rateMicros, { ...rate, field: `${at}.rateMicros` }],
      [tier.adjustmentMicros, { ...rate, field: `${at}.adjustmentMicros` }],
    ]);
    const last = index === tiers.length - 1;
    if (last && tier.upTo !== undefined)
      faults.push(
        fault('hole-above-last-tier', `${at}.upTo`, 'no upper bound in the last tier: use above it has no price'),
      );
    if (last) return faults;
    const below = tiers[index - 1]?.upTo ?? 0;
    faults.push(...checkNumber(tier.upTo, { field: `${at}.upTo`, unit: 'a month', above: 0 }));
    if (tier.upTo !== undefined && tier.upTo <= below)
      faults.push(fault('tiers-not-rising', `${at}.upTo`, `more than the tier below (${below})`));
    return faults;
  });
}

function checkMatrix(matrix: HourMatrix, field: string, periods: number): Refusal<TariffFault>[] {
  const faults: Refusal<TariffFault>[] = [];
  for (let month = 0; month < MONTHS; month += 1) {
    for (let hour = 0; hour < HOURS; hour += 1) {
      const period: unknown = matrix[month]?.[hour];
      if (typeof period === 'number' && Number.isInteger(period) && period >= 0 && period < periods) continue;
      const at = `${field}[${month}][${hour}]`;
      const hole = typeof period !== 'number' || Number.isNaN(period);
      faults.push(
        hole
          ? fault('hole-in-schedule', at, `a period for month ${month + 1} at ${hour}:00: twelve months of 24 hours`)
          : fault('unknown-period', at, `a period from 0 to ${periods - 1}`),
      );
    }
  }
  return faults;
}

const checkSchedule = (schedule: RateSchedule, field: string): Refusal<TariffFault>[] => [
  ...(schedule.periods.length === 0 ? [fault('no-periods', `${field}.periods`, 'at least one period')] : []),
  ...schedule.periods.flatMap((tiers, index) => checkTiers(tiers, `${field}.periods[${index}]`)),
  ...checkMatrix(schedule.weekday, `${field}.weekday`, schedule.periods.length),
  ...checkMatrix(schedule.weekend, `${field}.weekend`, schedule.periods.length),
];

function checkFlatDemand({ periods, months }: NonNullable<Tariff['flatDemand']>): Refusal<TariffFault>[] {
  const faults = periods.flatMap((tiers, index) => checkTiers(tiers, `flatDemand.periods[${index}]`));
  if (months.length !== MONTHS)
    faults.push(fault('not-twelve-months', 'flatDemand.months', 'twelve months, January first'));
  months.forEach((period, month) => {
    if (!Number.isInteger(period) || period < 0 || period >= periods.length)
      faults.push(fault('unknown-period', `flatDemand.months[${month}]`, `a period from 0 to ${periods.length - 1}`));
  });
  return faults;
}

/**
 * Every fault of a tariff, by field: none means that each hour of each month has a price at any use. A hole (an hour
 * without a period, a period that is not there, use above the last tier) is refused by name.
 *
 * @example checkTariff(tariff) // [{ reason: 'hole-in-schedule', field: 'energy.weekday[6][17]', allowed: 'a period for month 7 …' }]
 */
export function checkTariff(tariff: Tariff): Refusal<TariffFault>[] {
  const faults: Refusal<TariffFault>[] = [];
  if (tariff.name.trim() === '') faults.push(fault('no-name', 'name', 'a name'));
  if (!/^[A-Z]{3}$/.test(tariff.currency))
    faults.push(fault('no-currency', 'currency', 'three capitals of ISO 4217, such as USD'));
  faults.push(...checkNumber(tariff.fixedMicrosPerMonth, { field: 'fixedMicrosPerMonth', unit: 'micros', least: 0 }));
  faults.push(...checkSchedule(tariff.energy, 'energy'));
  const { monthlyAdjustmentMicros: monthly, demand, flatDemand } = tariff;
  if (monthly !== undefined && monthly.length !== MONTHS)
    faults.push(fault('not-twelve-months', 'monthlyAdjustmentMicros', 'twelve months, January first'));
  for (const [month, micros] of (monthly ?? []).entries())
    faults.push(...checkNumber(micros, { field: `monthlyAdjustmentMicros[${month}]`, unit: 'micros' }));
  if (demand !== undefined) faults.push(...checkSchedule(demand, 'demand'));
  if (flatDemand !== undefined) faults.push(...checkFlatDemand(flatDemand));
  return faults;
}
