import { describe, expect, it } from 'vitest';
import { listHourUsage } from '#shared/domain/energy/hour-usage.ts';
import { computeSavings } from '#shared/domain/energy/savings.ts';
import { type Baseline, nameplateWatts } from '#shared/domain/energy/savings-baseline.ts';
import { sampleRun } from '#tests/shared/domain/turnover/sample-runs.ts';
import { TIME_OF_USE, TWO_TIER } from './sample-tariffs.ts';

const HOUR = 3_600_000;
const july = Date.UTC(2026, 6, 1, 7);
const usageOf = (runs: Parameters<typeof listHourUsage>[0], hours: number) => {
  const usage = listHourUsage(runs, 'America/Phoenix', july, july + hours * HOUR);
  if (!usage.ok) throw new Error(JSON.stringify(usage.refusals));
  return usage.value;
};
/** Ten hours at 200 W and 30 gpm from 8 to 18 h, on a weekday. */
const usage = usageOf(
  [
    sampleRun(july, july + 8 * HOUR, { source: 'off', meanRpm: 0, wattHours: 0, gallons: 0 }),
    sampleRun(july + 8 * HOUR, july + 18 * HOUR),
  ],
  24,
);
const clamped: Baseline = { kind: 'clamped', watts: 1600, sigmaWatts: 80, basis: { kind: 'same-hours' } };

describe('savings', () => {
  it('are the old motor’s watts over the same hours, less what was used (computed by hand)', () => {
    const saved = computeSavings(clamped, { usage, meterSigmaShare: 0.02 }, TWO_TIER);

    expect(saved).toMatchObject({ ok: true, value: { method: 'A', stipulated: ['baseline-hours'] } });
    if (!saved.ok) return;
    expect(saved.value.baselineKwh).toBeCloseTo(16, 9);
    expect(saved.value.savedKwh).toBeCloseTo(14, 9);
    expect(saved.value.sigmaKwh).toBeCloseTo(Math.hypot(0.05 * 16, 0.02 * 2), 9);
    expect(saved.value.savedMicros).toBeCloseTo(14 * 0.1e6, 3);
    expect(saved.value.coverageShare).toBeCloseTo(18 / 24, 9);
  });

  it('are priced in the very hours the pump ran', () => {
    const saved = computeSavings(clamped, { usage, meterSigmaShare: 0.02 }, TIME_OF_USE);

    expect(saved.ok && saved.value.savedMicros).toBeCloseTo(1.4 * (8 * 0.12 + 2 * 0.48) * 1e6, 3);
  });

  it('hold the water equal instead where asked: the old motor needed less time for it', () => {
    const basis = { kind: 'same-volume', gpm: 60, sigmaGpm: 6 } as const;
    const saved = computeSavings(
      { ...clamped, basis },
      { usage, meterSigmaShare: 0.02, flowSigmaShare: 0.1 },
      TWO_TIER,
    );

    expect(saved.ok && saved.value.baselineKwh).toBeCloseTo(8, 9);
    expect(saved.ok && saved.value.stipulated).toEqual(['baseline-hours', 'baseline-flow']);
    expect(saved.ok && saved.value.sigmaKwh).toBeCloseTo(Math.hypot(Math.hypot(0.05, 0.1, 0.1) * 8, 0.04), 9);
  });

  it('are of method B only where both sides were measured', () => {
    const logged = computeSavings({ ...clamped, kind: 'logged' }, { usage, meterSigmaShare: 0.02 }, TWO_TIER);
    const nameplate = computeSavings({ ...clamped, kind: 'nameplate' }, { usage, meterSigmaShare: 0.02 }, TWO_TIER);

    expect(logged.ok && [logged.value.method, logged.value.stipulated]).toEqual(['B', []]);
    expect(nameplate.ok && nameplate.value.stipulated).toEqual(['baseline-watts', 'baseline-hours']);
  });

  it('come out below zero where the new motor uses more', () => {
    const saved = computeSavings({ ...clamped, watts: 100 }, { usage, meterSigmaShare: 0.02 }, TWO_TIER);

    expect(saved.ok && saved.value.savedKwh).toBeCloseTo(-1, 9);
  });

  it.each([
    ['a baseline of nothing', { ...clamped, watts: 0 }, 'baseline.watts'],
    ['a negative baseline', { ...clamped, watts: -5 }, 'baseline.watts'],
    ['a sigma that is no number', { ...clamped, sigmaWatts: Number.NaN }, 'baseline.sigmaWatts'],
    ['no old flow', { ...clamped, basis: { kind: 'same-volume', gpm: 0, sigmaGpm: 1 } }, 'baseline.basis.gpm'],
  ] as const)('refuse %s by name', (_, baseline, field) => {
    const saved = computeSavings(baseline, { usage, meterSigmaShare: 0.02 }, TWO_TIER);

    expect(saved.ok ? [] : saved.refusals.map((one) => one.field)).toContain(field);
  });

  it('refuse to hold water equal where none is known', () => {
    const dry = usageOf([sampleRun(july, july + HOUR, { gallons: undefined })], 1);
    const basis = { kind: 'same-volume', gpm: 60, sigmaGpm: 6 } as const;

    expect(computeSavings({ ...clamped, basis }, { usage: dry, meterSigmaShare: 0.02 }, TWO_TIER)).toMatchObject({
      ok: false,
      refusals: [{ reason: 'no-water' }],
    });
  });

  it('reckon an old motor by its total horsepower, as an estimate', () => {
    // Total horsepower = nameplate × service factor: darrenspoolservices.com/title20. Efficiency 0.75: common practice.
    expect(nameplateWatts(1.5, 1.1)?.watts).toBeCloseTo((1.65 * 745.7) / 0.75, 0);
    expect(nameplateWatts(1.5, 1.1)?.sigmaWatts).toBeCloseTo(246, 0);
    expect([0, -1, 50, Number.NaN].map((horsepower) => nameplateWatts(horsepower, 1.1))).toEqual(
      Array(4).fill(undefined),
    );
    expect(nameplateWatts(1, Number.NaN)).toBeUndefined();
  });
});
