import { describe, expect, it } from 'vitest';
import { checkTariff } from '#shared/domain/energy/check-tariff.ts';
import type { RateTier, Tariff } from '#shared/domain/energy/tariff.ts';
import { checkTariffTerms, findTariff } from '#shared/domain/energy/tariff-history.ts';
import { TIME_OF_USE, TWO_TIER } from './sample-tariffs.ts';

const faults = (tariff: Tariff): string[] => checkTariff(tariff).map(({ field, reason }) => `${field}: ${reason}`);
const withTiers = (tiers: readonly RateTier[]): Tariff => ({
  ...TWO_TIER,
  energy: { ...TWO_TIER.energy, periods: [tiers] },
});
const withHours = (month: number, hour: number, period: number): Tariff => ({
  ...TIME_OF_USE,
  energy: {
    ...TIME_OF_USE.energy,
    weekend: TIME_OF_USE.energy.weekend.map((hours, index) =>
      index === month ? hours.map((one, at) => (at === hour ? period : one)) : hours,
    ),
  },
});
const plain = { rateMicros: 100_000, adjustmentMicros: 0 };

describe('tariff check', () => {
  it('lets a whole tariff through', () => {
    expect(checkTariff(TWO_TIER)).toEqual([]);
    expect(checkTariff(TIME_OF_USE)).toEqual([]);
  });

  it('names the hour of a hole, and what belongs there', () => {
    const short = { ...TWO_TIER, energy: { ...TWO_TIER.energy, weekend: TWO_TIER.energy.weekend.slice(0, 11) } };

    expect(checkTariff(short)[0]).toEqual({
      reason: 'hole-in-schedule',
      field: 'energy.weekend[11][0]',
      allowed: 'a period for month 12 at 0:00: twelve months of 24 hours',
    });
    expect(checkTariff(short)).toHaveLength(24);
  });

  it.each([
    ['a period that is not there', withHours(6, 17, 3), 'energy.weekend[6][17]: unknown-period'],
    ['a period that is not whole', withHours(6, 17, 0.5), 'energy.weekend[6][17]: unknown-period'],
    ['a period that is no number', withHours(6, 17, Number.NaN), 'energy.weekend[6][17]: hole-in-schedule'],
    [
      'use above the last tier',
      withTiers([{ ...plain, upTo: 300 }]),
      'energy.periods[0][0].upTo: hole-above-last-tier',
    ],
    [
      'tiers that fall',
      withTiers([{ ...plain, upTo: 300 }, { ...plain, upTo: 200 }, plain]),
      'energy.periods[0][1].upTo: tiers-not-rising',
    ],
    ['a tier without a bound below another', withTiers([plain, plain]), 'energy.periods[0][0].upTo: not-finite'],
    ['a period without tiers', withTiers([]), 'energy.periods[0]: no-periods'],
    [
      'a price that is no number',
      withTiers([{ ...plain, rateMicros: Number.NaN }]),
      'energy.periods[0][0].rateMicros: not-finite',
    ],
    [
      'an endless adjustment',
      withTiers([{ ...plain, adjustmentMicros: Number.POSITIVE_INFINITY }]),
      'energy.periods[0][0].adjustmentMicros: not-finite',
    ],
    ['no currency', { ...TWO_TIER, currency: 'dollars' }, 'currency: no-currency'],
    ['no name', { ...TWO_TIER, name: ' ' }, 'name: no-name'],
    ['a negative fixed charge', { ...TWO_TIER, fixedMicrosPerMonth: -1 }, 'fixedMicrosPerMonth: too-small'],
    [
      'eleven adjustments',
      { ...TWO_TIER, monthlyAdjustmentMicros: Array.from({ length: 11 }, () => 0) },
      'monthlyAdjustmentMicros: not-twelve-months',
    ],
    [
      'a flat demand of two months',
      { ...TWO_TIER, flatDemand: { periods: [[plain]], months: [0, 0] } },
      'flatDemand.months: not-twelve-months',
    ],
  ])('refuses %s', (_, tariff, fault) => {
    expect(faults(tariff)).toContain(fault);
  });
});

describe('tariff history', () => {
  const term = (from: number, to: number | undefined) => ({ from, to, tariff: TWO_TIER });

  it('finds the tariff in force', () => {
    const terms = [term(0, 10), { ...term(10, undefined), tariff: TIME_OF_USE }];

    expect(checkTariffTerms(terms)).toEqual([]);
    expect(findTariff(terms, 9)?.name).toBe('Two tiers');
    expect(findTariff(terms, 10)?.name).toBe('Time of use');
    expect(findTariff(terms, -1)).toBeUndefined();
    expect(findTariff([term(0, 10)], 10)).toBeUndefined();
  });

  it('refuses a hole, an overlap and a term that ends before it starts, by name', () => {
    expect(checkTariffTerms([term(0, 10), term(12, undefined)])).toMatchObject([
      { reason: 'hole-between-terms', field: 'terms[1].from' },
    ]);
    expect(checkTariffTerms([term(0, undefined), term(12, undefined)])).toMatchObject([{ reason: 'terms-overlap' }]);
    expect(checkTariffTerms([term(10, 5)])).toMatchObject([{ reason: 'ends-before-it-starts', field: 'terms[0].to' }]);
    expect(checkTariffTerms([term(Number.NaN, undefined)])).toMatchObject([{ reason: 'not-an-instant' }]);
  });
});
