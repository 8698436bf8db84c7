import { describe, expect, it } from 'vitest';
import { calendarMonth, daysInMonth } from '#shared/domain/energy/calendar-month.ts';
import { stateCost } from '#shared/domain/energy/cost-statement.ts';
import { listHourUsage } from '#shared/domain/energy/hour-usage.ts';
import { priceDemand } from '#shared/domain/energy/price-demand.ts';
import { priceEnergy } from '#shared/domain/energy/price-energy.ts';
import { priceFixed } from '#shared/domain/energy/price-fixed.ts';
import { localDays } from '#shared/domain/time/local-days.ts';
import { sampleRun } from '#tests/shared/domain/turnover/sample-runs.ts';
import { TIME_OF_USE, TWO_TIER } from './sample-tariffs.ts';

const HOUR = 3_600_000;
const ZONE = 'America/Phoenix';
/** 1 July 2026 00:00 in Phoenix, a Wednesday. */
const july = Date.UTC(2026, 6, 1, 7);
const usageOf = (runs: Parameters<typeof listHourUsage>[0], to: number, minutes: 15 | 60 = 60) => {
  const usage = listHourUsage(runs, ZONE, july, to, minutes);
  if (!usage.ok) throw new Error(JSON.stringify(usage.refusals));
  return usage.value;
};

describe('calendar', () => {
  it.each([
    [Date.UTC(2026, 6, 1), { year: 2026, month: 6 }],
    [Date.UTC(2027, 11, 31), { year: 2027, month: 11 }],
    [Date.UTC(1969, 11, 31), { year: 1969, month: 11 }],
  ])('knows the month of a day', (at, month) => {
    expect(calendarMonth(at / 86_400_000)).toEqual(month);
  });

  it('knows leap years', () => {
    expect([2026, 2028, 2100].map((year) => daysInMonth({ year, month: 1 }))).toEqual([28, 29, 28]);
  });
});

describe('demand', () => {
  const demand = {
    ...TIME_OF_USE.energy,
    periods: [
      [{ rateMicros: 0, adjustmentMicros: 0 }],
      [{ rateMicros: 0, adjustmentMicros: 0 }],
      [{ rateMicros: 8_000_000, adjustmentMicros: 0 }],
    ],
  };
  const runs = [
    sampleRun(july + 6 * HOUR, july + 16.5 * HOUR, { wattHours: 2000 * 10.5 }),
    sampleRun(july + 16.5 * HOUR, july + 20 * HOUR, { wattHours: 400 * 3.5 }),
  ];

  it('takes the largest quarter-hour of each period, and prices it', () => {
    const lines = priceDemand({ ...TIME_OF_USE, demand }, usageOf(runs, july + 24 * HOUR, 15));

    expect(lines.map(({ period, kilowatts, micros }) => [period, kilowatts, micros])).toEqual([
      [0, 2, 0],
      [2, 2, 16_000_000],
    ]);
  });

  it('takes the mean of the window: two minutes of prime are not a quarter-hour’s load', () => {
    const short = [sampleRun(july + 17 * HOUR, july + 17 * HOUR + 120_000, { wattHours: 3000 / 30 })];
    const lines = priceDemand({ ...TIME_OF_USE, demand }, usageOf(short, july + 24 * HOUR, 15));

    expect(lines[0]?.kilowatts).toBeCloseTo(0.4, 9);
  });

  it('prices the largest of all hours by month, and nothing without a demand price', () => {
    const flatDemand = {
      periods: [[{ rateMicros: 1_000_000, adjustmentMicros: 0 }]],
      months: Array.from({ length: 12 }, () => 0),
    };

    expect(priceDemand({ ...TIME_OF_USE, flatDemand }, usageOf(runs, july + 24 * HOUR, 15))).toMatchObject([
      { period: 'flat', kilowatts: 2, micros: 2_000_000 },
    ]);
    expect(priceDemand(TIME_OF_USE, usageOf(runs, july + 24 * HOUR, 15))).toEqual([]);
  });
});

describe('statement', () => {
  it('shares the fixed charge by days of its month', () => {
    const days = localDays(ZONE, july + 25 * 24 * HOUR, july + 36 * 24 * HOUR);

    expect(priceFixed(TWO_TIER, days)).toEqual([
      { month: { year: 2026, month: 6 }, days: 6, micros: (6 * 12e6) / 31 },
      { month: { year: 2026, month: 7 }, days: 5, micros: (5 * 12e6) / 31 },
    ]);
  });

  it('adds up to the cent, line by line', () => {
    const runs = [sampleRun(july, july + 3 * 24 * HOUR, { wattHours: 33_333 })];
    const priced = priceEnergy(TIME_OF_USE, usageOf(runs, july + 3 * 24 * HOUR));
    if (!priced.ok) throw new Error('must price');
    const statement = stateCost(
      TIME_OF_USE,
      priced.value,
      [],
      priceFixed(TWO_TIER, localDays(ZONE, july, july + 72 * HOUR)),
    );

    expect(statement?.lines.map(({ kind }) => kind)).toEqual(['energy', 'energy', 'fixed']);
    expect(statement?.lines.reduce((sum, line) => sum + line.minorUnits, 0)).toBe(statement?.minorUnits);
    expect(statement?.minorUnits).toBe(Math.round((priced.value.micros + (3 * 12e6) / 31) / 1e4));
    expect(statement?.kwh).toBeCloseTo(33.333, 9);
  });
});
