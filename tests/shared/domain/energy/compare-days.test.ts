import { describe, expect, it } from 'vitest';
import { compareDays } from '#shared/domain/energy/compare-days.ts';
import { listLocalSlices } from '#shared/domain/energy/local-slices.ts';
import type { BilledHour, DayTerm, DayUse } from '#shared/domain/energy/price-days.ts';
import { computeSavings } from '#shared/domain/energy/savings.ts';
import type { Baseline } from '#shared/domain/energy/savings-baseline.ts';
import { sumSavings } from '#shared/domain/energy/sum-savings.ts';
import type { Tariff } from '#shared/domain/energy/tariff.ts';
import { METER_AS_FITTED } from '#shared/domain/hydraulics/meter-error.ts';
import { localDay } from '#shared/domain/time/local-days.ts';
import { TIME_OF_USE, TWO_TIER } from './sample-tariffs.ts';

const ZONE = 'America/Los_Angeles';
/** 2025-11-01: a month with a day of 25 hours. */
const FIRST = Date.UTC(2025, 10, 1) / 86_400_000;
const clamped: Baseline = { kind: 'clamped', watts: 2000, sigmaWatts: 100, basis: { kind: 'same-hours' } };

const term = (tariff: Tariff, more: Partial<DayTerm> = {}): DayTerm => ({
  id: tariff.name,
  tariff,
  fromDay: undefined,
  toDay: undefined,
  ...more,
});

function dayOf(epochDay: number, gallons: (hour: number) => number = () => 2400): DayUse {
  const day = localDay(ZONE, epochDay)!;
  const hours = listLocalSlices(ZONE, day.from, day.to, 60).map((slice): BilledHour => {
    const turningMs = slice.hour >= 6 ? slice.to - slice.from : 0;
    const wattHours = turningMs > 0 ? 300 + slice.hour : 0;
    const water = turningMs > 0 ? gallons(slice.hour) : 0;
    return { ...slice, wattHours, quarterWattHours: wattHours / 4, turningMs, coveredMs: turningMs, gallons: water };
  });
  return { epochDay, hours };
}
const november = Array.from({ length: 30 }, (_, index) => dayOf(FIRST + index));

describe('days beside what the motor before would have used', () => {
  it.each([TWO_TIER, TIME_OF_USE])(
    'add up to the savings of their month, by tiers and by time of use ($name)',
    (tariff) => {
      const whole = computeSavings(
        clamped,
        { usage: november.flatMap(({ hours }) => hours), meterSigmaShare: METER_AS_FITTED.share },
        tariff,
      );
      const saved = sumSavings(clamped, compareDays(clamped, november, [term(tariff)]))!;
      if (!whole.ok) throw new Error('refused');
      expect(saved.savedKwh).toBeCloseTo(whole.value.savedKwh, 6);
      expect(saved.sigmaKwh).toBeCloseTo(whole.value.sigmaKwh, 6);
      expect(saved.savedMicros).toBeCloseTo(whole.value.savedMicros, 0);
      expect(saved.sigmaMicros).toBeCloseTo(whole.value.sigmaMicros, 0);
      expect(saved).toMatchObject({ method: 'A', stipulated: ['baseline-hours'] });
    },
  );

  it('are 18 hours at the old watts, computed by hand', () => {
    const [first] = compareDays(clamped, november, [term(TWO_TIER)]);
    expect(first!.before).toEqual({ kwh: expect.closeTo(36, 9), micros: expect.closeTo(36 * 0.1e6, 3) });
    expect(first!.after.kwh).toBeCloseTo((18 * 300 + 6 * 18 + (17 * 18) / 2) / 1000, 9);
  });

  it('have no money where no tariff was in force, nor over two currencies', () => {
    const half = [
      term(TWO_TIER, { toDay: FIRST + 10 }),
      term({ ...TIME_OF_USE, currency: 'EUR' }, { fromDay: FIRST + 10 }),
    ];
    expect(sumSavings(clamped, compareDays(clamped, november, []))).toMatchObject({ savedMicros: undefined });
    const mixed = sumSavings(clamped, compareDays(clamped, november, half))!;
    expect(mixed.savedMicros).toBeUndefined();
    expect(mixed.baselineKwh).toBeCloseTo(36 * 30, 6);
  });

  it('leave out, on both sides, hours of which the water is not known, where the water is held equal', () => {
    const basis = { kind: 'same-volume', gpm: 80, sigmaGpm: 8 } as const;
    const dry = dayOf(FIRST, (hour) => (hour < 12 ? 0 : 2400));
    const [day] = compareDays({ ...clamped, basis }, [dry], []);
    // 12 hours at 40 gpm would have taken 6 at 80.
    expect(day!.before.kwh).toBeCloseTo(12, 9);
    expect(compareDays({ ...clamped, basis }, [dayOf(FIRST, () => 0)], [])).toEqual([]);
  });

  it('are none for a baseline out of range or a tariff with a hole', () => {
    const holed = { ...TWO_TIER, energy: { ...TWO_TIER.energy, weekday: [] } };
    expect(compareDays({ ...clamped, watts: -1 }, november, [term(TWO_TIER)])).toEqual([]);
    expect(compareDays(clamped, november, [term(holed)])).toEqual([]);
    expect(sumSavings(clamped, [])).toBeUndefined();
  });
});
