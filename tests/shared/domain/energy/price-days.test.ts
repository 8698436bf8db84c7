import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { listLocalSlices } from '#shared/domain/energy/local-slices.ts';
import { type BilledHour, type DayTerm, type DayUse, priceDays } from '#shared/domain/energy/price-days.ts';
import { priceDemand } from '#shared/domain/energy/price-demand.ts';
import { priceEnergy } from '#shared/domain/energy/price-energy.ts';
import type { Tariff } from '#shared/domain/energy/tariff.ts';
import { localDay } from '#shared/domain/time/local-days.ts';
import { TIME_OF_USE, TWO_TIER } from './sample-tariffs.ts';

const ZONE = 'America/Los_Angeles';
/** 2025-11-01: a month with a day of 25 hours. */
const FIRST = Date.UTC(2025, 10, 1) / 86_400_000;

const term = (tariff: Tariff, more: Partial<DayTerm> = {}): DayTerm => ({
  id: tariff.name,
  tariff,
  fromDay: undefined,
  toDay: undefined,
  ...more,
});

function dayOf(epochDay: number, wattsAt: (hour: number) => number): DayUse {
  const day = localDay(ZONE, epochDay);
  if (day === undefined) throw new Error('an unknown zone');
  const hours = listLocalSlices(ZONE, day.from, day.to, 60).map((slice): BilledHour => {
    const wattHours = (wattsAt(slice.hour) * (slice.to - slice.from)) / 3_600_000;
    const ms = slice.to - slice.from;
    return { ...slice, wattHours, quarterWattHours: wattHours / 4, turningMs: ms, coveredMs: ms, gallons: 0 };
  });
  return { epochDay, hours };
}

const monthOf = (watts: readonly number[]) => watts.map((value, index) => dayOf(FIRST + index, () => value));
const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0);
const watts = fc.array(fc.integer({ min: 0, max: 3000 }), { minLength: 1, maxLength: 30 });

describe('days priced one by one', () => {
  it('cost what their month costs, with tiers and by time of use', () => {
    fc.assert(
      fc.property(watts, fc.constantFrom(TWO_TIER, TIME_OF_USE), (given, tariff) => {
        const days = monthOf(given);
        const whole = priceEnergy(
          tariff,
          days.flatMap(({ hours }) => hours),
        );
        const priced = priceDays(days, [term(tariff)]);
        expect(sum(priced.map(({ micros }) => micros))).toBeCloseTo(whole.ok ? whole.value.micros : Number.NaN, 2);
        expect(sum(priced.map(({ kwh }) => kwh))).toBeCloseTo(whole.ok ? whole.value.kwh : Number.NaN, 6);
      }),
      { numRuns: 50 },
    );
  });

  it('reach the second tier on the day that the month does: 300 kWh at 0.10, the rest at 0.25', () => {
    // Two-tier form r1·min(kWh, T) + r2·max(kWh − T, 0): common practice.
    const priced = priceDays(monthOf([5000, 5000, 5000]), [term(TWO_TIER)]);
    const kwh = priced.map((day) => day.kwh);
    // 2025-11-02 has 25 hours.
    expect(kwh).toEqual([120, 125, 120]);
    expect(priced[0]?.micros).toBeCloseTo(12e6, 3);
    expect(priced[1]?.micros).toBeCloseTo(12.5e6, 3);
    expect(priced[2]?.micros).toBeCloseTo(55 * 0.1e6 + 65 * 0.25e6, 3);
  });

  it('begin a new month with its first tier', () => {
    const days = [dayOf(FIRST - 1, () => 20_000), dayOf(FIRST, () => 5000)];
    expect(priceDays(days, [term(TWO_TIER)])[1]?.micros).toBeCloseTo(12e6, 3);
  });

  it('go by the tariff of the day, and are without a price where none is in force', () => {
    const terms = [term(TWO_TIER, { fromDay: FIRST + 1, toDay: FIRST + 2 }), term(TIME_OF_USE, { fromDay: FIRST + 2 })];
    const priced = priceDays(monthOf([1000, 1000, 1000]), terms);
    expect(priced.map((day) => day.term?.id)).toEqual([undefined, 'Two tiers', 'Time of use']);
    expect(priced[0]).toMatchObject({ micros: 0, kwh: 24, kwhByPeriod: [] });
  });

  it('lay the month’s demand on the day of its peak', () => {
    const flat = { periods: [[{ rateMicros: 8_000_000, adjustmentMicros: 0 }]], months: Array(12).fill(0) };
    const tariff: Tariff = { ...TWO_TIER, flatDemand: flat };
    const days = monthOf([1000, 1600, 1200]);
    const priced = priceDays(days, [term(tariff)]);
    expect(priced.map(({ demandMicros }) => demandMicros)).toEqual([0, 1.6 * 8e6, 0]);
    const quarters = days.flatMap(({ hours }) =>
      hours.map((hour) => ({ ...hour, to: hour.from + 900_000, wattHours: hour.quarterWattHours })),
    );
    expect(sum(priceDemand(tariff, quarters).map(({ micros }) => micros))).toBeCloseTo(1.6 * 8e6, 3);
  });

  it('are not priced by a tariff with a hole', () => {
    const hole: Tariff = { ...TWO_TIER, energy: { ...TWO_TIER.energy, weekday: TWO_TIER.energy.weekday.slice(0, 6) } };
    expect(priceDays(monthOf([1000]), [term(hole)])[0]?.term).toBeUndefined();
  });
});
