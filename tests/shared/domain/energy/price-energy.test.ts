import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { listHourUsage } from '#shared/domain/energy/hour-usage.ts';
import { type PricingOptions, priceEnergy } from '#shared/domain/energy/price-energy.ts';
import type { Tariff } from '#shared/domain/energy/tariff.ts';
import type { Run } from '#shared/domain/runs/run.ts';
import { instantOf } from '#shared/domain/time/instant-of.ts';
import { localDayAt } from '#shared/domain/time/local-days.ts';
import { sampleRun } from '#tests/shared/domain/turnover/sample-runs.ts';
import { TIME_OF_USE, TWO_TIER } from './sample-tariffs.ts';

const HOUR = 3_600_000;
const ZONE = 'America/New_York';
const kilowatt = (from: number, to: number): Run => sampleRun(from, to, { wattHours: ((to - from) / HOUR) * 1000 });
/** 1 July 2026 00:00 in New York, a Wednesday. */
const july = instantOf(ZONE, Date.UTC(2026, 6, 1) / 86_400_000, 0) ?? 0;

function price(tariff: Tariff, runs: Run[], from: number, to: number, options?: PricingOptions) {
  const usage = listHourUsage(runs, ZONE, from, to);
  if (!usage.ok) throw new Error(JSON.stringify(usage.refusals));
  const priced = priceEnergy(tariff, usage.value, options);
  if (!priced.ok) throw new Error(JSON.stringify(priced.refusals));
  return priced.value;
}

describe('price of energy', () => {
  // Form: month charge = r1·min(kWh, T) + r2·max(kWh − T, 0), a public repository quoting it.
  it.each([
    [200, 20],
    [300, 30],
    [500, 30 + 50],
  ])('charges %i kWh in two tiers: %i dollars', (kwh, dollars) => {
    const priced = price(
      TWO_TIER,
      [sampleRun(july, july + 100 * HOUR, { wattHours: kwh * 1000 })],
      july,
      july + 100 * HOUR,
    );

    expect(priced.micros).toBeCloseTo(dollars * 1e6, 3);
    expect(priced.kwh).toBeCloseTo(kwh, 9);
  });

  it('charges a summer weekday by its periods: 19 hours off-peak and 5 at peak (computed by hand)', () => {
    const priced = price(TIME_OF_USE, [kilowatt(july, july + 24 * HOUR)], july, july + 24 * HOUR);

    expect(priced.lines.map(({ period, kwh }) => [period, Math.round(kwh * 1e6) / 1e6])).toEqual([
      [0, 19],
      [2, 5],
    ]);
    expect(priced.micros).toBeCloseTo((19 * 0.12 + 5 * 0.48) * 1e6, 3);
  });

  it('charges a weekend off-peak all day, and a winter weekday at its own price', () => {
    const saturday = july + 3 * 24 * HOUR;
    expect(
      price(TIME_OF_USE, [kilowatt(saturday, saturday + 24 * HOUR)], saturday, saturday + 24 * HOUR).micros,
    ).toBeCloseTo(24 * 0.12e6, 3);
    const january = instantOf(ZONE, Date.UTC(2026, 0, 5) / 86_400_000, 0) ?? 0;
    expect(
      price(TIME_OF_USE, [kilowatt(january, january + 24 * HOUR)], january, january + 24 * HOUR).micros,
    ).toBeCloseTo((19 * 0.12 + 5 * 0.3) * 1e6, 3);
  });

  // 8 March and 1 November 2026 in the United States.
  it.each([
    [Date.UTC(2026, 2, 8, 17), 23],
    [Date.UTC(2026, 10, 1, 17), 25],
  ])('charges the day of a clock shift for its %#: all of its hours', (noon, hours) => {
    const day = localDayAt(ZONE, noon);
    if (day === undefined) throw new Error('known zone');
    const priced = price(TIME_OF_USE, [kilowatt(day.from, day.to)], day.from, day.to);

    expect(priced.kwh).toBeCloseTo(hours, 9);
    expect(priced.micros).toBeCloseTo(hours * 0.12e6, 3);
  });

  it('adds the month’s adjustment to every kWh', () => {
    const adjusted = {
      ...TIME_OF_USE,
      monthlyAdjustmentMicros: Array.from({ length: 12 }, (_, month) => month * 1000),
    };

    expect(price(adjusted, [kilowatt(july, july + 10 * HOUR)], july, july + 10 * HOUR).micros).toBeCloseTo(
      10 * (120_000 + 6000),
      3,
    );
  });

  it('starts the pump’s tiers above what the rest of the meter uses', () => {
    const runs = [kilowatt(july, july + 100 * HOUR)];

    expect(price(TWO_TIER, runs, july, july + 100 * HOUR, { otherKwhByPeriod: [250] }).micros).toBeCloseTo(
      (50 * 0.1 + 50 * 0.25) * 1e6,
      3,
    );
  });

  it('begins the tiers anew with each month', () => {
    const august = july + 31 * 24 * HOUR;
    const runs = [
      sampleRun(july, august, { wattHours: 300_000 }),
      sampleRun(august, august + 31 * 24 * HOUR, { wattHours: 300_000 }),
    ];

    expect(price(TWO_TIER, runs, july, august + 31 * 24 * HOUR).micros).toBeCloseTo(60e6, 0);
  });

  it('widens daily tiers by the days of the month', () => {
    const daily: Tariff = {
      ...TWO_TIER,
      energy: {
        ...TWO_TIER.energy,
        periods: [
          [
            { rateMicros: 100_000, adjustmentMicros: 0, upTo: 10, perDay: true },
            { rateMicros: 250_000, adjustmentMicros: 0 },
          ],
        ],
      },
    };

    expect(price(daily, [sampleRun(july, july + HOUR, { wattHours: 320_000 })], july, july + HOUR).micros).toBeCloseTo(
      (310 * 0.1 + 10 * 0.25) * 1e6,
      3,
    );
  });

  it('costs the same priced whole or in parts that carry on, wherever it is cut', () => {
    const from = july - 20 * 24 * HOUR;
    const to = july + 20 * 24 * HOUR;
    const runs = [sampleRun(from, to, { wattHours: 900_000 })];
    fc.assert(
      fc.property(fc.integer({ min: 1, max: to - from - 1 }), fc.constantFrom(TWO_TIER, TIME_OF_USE), (cut, tariff) => {
        const whole = price(tariff, runs, from, to);
        const before = price(tariff, runs, from, from + cut);
        const after = price(tariff, runs, from + cut, to, { carried: before.carried });
        expect(before.micros + after.micros).toBeCloseTo(whole.micros, 1);
        expect(before.kwh + after.kwh).toBeCloseTo(whole.kwh, 6);
        expect(after.carried?.kwhByPeriod[0]).toBeCloseTo(whole.carried?.kwhByPeriod[0] ?? 0, 6);
      }),
    );
  });

  it('costs more for more energy', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 1e6, noNaN: true }),
        fc.double({ min: 1, max: 1e5, noNaN: true }),
        (wattHours, more) => {
          const at = (amount: number) =>
            price(TWO_TIER, [sampleRun(july, july + HOUR, { wattHours: amount })], july, july + HOUR).micros;
          expect(at(wattHours + more)).toBeGreaterThan(at(wattHours));
        },
      ),
    );
  });

  it.each([-1, Number.NaN, Number.POSITIVE_INFINITY])('refuses %s watt-hours by name', (wattHours) => {
    const priced = priceEnergy(TWO_TIER, [{ epochDay: 20_000, weekday: 0, hour: 3, wattHours }]);

    expect(priced).toMatchObject({
      ok: false,
      refusals: [{ reason: 'usage-not-finite', field: 'usage[0].wattHours' }],
    });
  });

  it('refuses a tariff with a hole before it prices anything', () => {
    const weekday = TWO_TIER.energy.weekday.map((hours, month) => (month === 6 ? hours.slice(0, 17) : hours));
    const priced = priceEnergy({ ...TWO_TIER, energy: { ...TWO_TIER.energy, weekday } }, []);

    expect(priced.ok ? [] : priced.refusals[0]).toMatchObject({
      reason: 'hole-in-schedule',
      field: 'energy.weekday[6][17]',
    });
  });
});
