import { describe, expect, it } from 'vitest';
import { type CalibrationReading, calibrateWetEnd } from '#shared/domain/hydraulics/calibrate-wet-end.ts';
import { estimateFlow } from '#shared/domain/hydraulics/estimate-flow.ts';
import { FEET_PER_INCH_OF_MERCURY, feetFromPsi, headFromGauges } from '#shared/domain/hydraulics/head-from-gauges.ts';
import { METER_CHECKED } from '#shared/domain/hydraulics/meter-error.ts';
import { headAt, wattsAt } from '#shared/domain/hydraulics/wet-end-curve.ts';
import { psiToFeetOfWater } from '#shared/units/pressure.ts';
import { fitOrFail, POOL_SHEET } from './sample-wet-ends.ts';

const pool = fitOrFail(POOL_SHEET);
/** The true pump draws 6 per cent more than its sheet. */
const trueWatts = (gpm: number): number => 8 + 1.06 * ((wattsAt(pool, 3450, gpm) ?? 0) - 8);
const psiAt = (gpm: number): number =>
  ((headAt(pool, 3450, gpm) ?? 0) - 6 * FEET_PER_INCH_OF_MERCURY) / psiToFeetOfWater(1);

const faultOf = (reading: CalibrationReading): string => {
  const outcome = calibrateWetEnd(pool, reading, METER_CHECKED);
  return outcome.ok ? 'accepted' : outcome.refusals.map(({ reason, field }) => `${field}: ${reason}`).join();
};

describe('calibration', () => {
  it('turns psi and vacuum into feet (HI engineering data book: 14.6959 psi = 29.9213 inHg = 33.9596 ft)', () => {
    expect(feetFromPsi(14.6959)).toBeCloseTo(33.9596, 9);
    expect(feetFromPsi(1)).toBeCloseTo(2.3108, 4);
    expect(headFromGauges({ dischargePsi: 0, suctionInchesOfMercury: 29.9213 })).toBeCloseTo(33.9596, 9);
    expect(headFromGauges({ dischargePsi: 10, suctionInchesOfMercury: 0, dischargeAboveSuctionFeet: 2 })).toBeCloseTo(
      25.108,
      3,
    );
    expect(headFromGauges({ dischargePsi: Number.NaN, suctionInchesOfMercury: 0 })).toBeUndefined();
    expect(headFromGauges({ dischargePsi: -20, suctionInchesOfMercury: 0 })).toBeUndefined();
  });

  it.each([
    ['a gauge pair', { kind: 'gauges', gauges: { dischargePsi: psiAt(60), suctionInchesOfMercury: 6 } }],
    ['a measured flow', { kind: 'flow', gpm: 60 }],
  ] as const)('finds the gain of a pump that draws more than its sheet from %s', (_, measured) => {
    const outcome = calibrateWetEnd(pool, { rpm: 3450, watts: trueWatts(60), measured }, METER_CHECKED);

    expect(outcome.ok && outcome.value.wattsGain).toBeCloseTo(1.06, 6);
    expect(outcome.ok && outcome.value.gpm).toBeCloseTo(60, 6);
  });

  it('reads true flows afterwards, where the sheet alone was wrong', () => {
    const outcome = calibrateWetEnd(
      pool,
      { rpm: 3450, watts: trueWatts(60), measured: { kind: 'flow', gpm: 60, sigmaGpm: 1 } },
      METER_CHECKED,
    );
    if (!outcome.ok) throw new Error('must calibrate');
    const read = (curve: typeof pool): number => {
      const answer = estimateFlow(curve, { rpm: 3450, watts: trueWatts(40) }, METER_CHECKED);
      return answer.kind === 'estimate' ? answer.gpm : Number.NaN;
    };

    expect(read(outcome.value.curve)).toBeCloseTo(40, 6);
    expect(read(pool)).toBeGreaterThan(45);
  });

  it('uses the filter psi alone with a guess for the suction side, and is less sure of it', () => {
    const psi = ((headAt(pool, 3450, 80) ?? 0) - 6) / psiToFeetOfWater(1);
    const fromPsi = calibrateWetEnd(
      pool,
      { rpm: 3450, watts: trueWatts(80), measured: { kind: 'psi', psi } },
      METER_CHECKED,
    );
    const pair = { dischargePsi: psiAt(80), suctionInchesOfMercury: 6 };
    const fromPair = calibrateWetEnd(
      pool,
      { rpm: 3450, watts: trueWatts(80), measured: { kind: 'gauges', gauges: pair } },
      METER_CHECKED,
    );

    expect(fromPsi.ok && fromPsi.value.wattsGain).toBeCloseTo(1.06, 6);
    expect(fromPsi.ok && fromPair.ok && fromPsi.value.sigmaGpm > fromPair.value.sigmaGpm).toBe(true);
  });

  it.each([
    ['a slow speed', { rpm: 1000, watts: 60, measured: { kind: 'flow', gpm: 20 } }, 'rpm: too-slow'],
    ['a head above shut-off', { rpm: 3450, watts: 1500, measured: { kind: 'psi', psi: 60 } }, 'measured: off-curve'],
    [
      'a head where the curve is flat',
      { rpm: 3450, watts: 1000, measured: { kind: 'psi', psi: 33.5 } },
      'measured: flat-curve',
    ],
    [
      'a gauge that is no number',
      { rpm: 3450, watts: 1500, measured: { kind: 'psi', psi: Number.NaN } },
      'measured: no-head',
    ],
    ['no flow', { rpm: 3450, watts: 1500, measured: { kind: 'flow', gpm: 0 } }, 'measured.gpm: too-small'],
    [
      'a flow past the curve',
      { rpm: 3450, watts: 1500, measured: { kind: 'flow', gpm: 300 } },
      'measured.gpm: too-large',
    ],
    ['negative watts', { rpm: 3450, watts: -5, measured: { kind: 'flow', gpm: 60 } }, 'watts: too-small'],
    [
      'an endless speed',
      { rpm: Number.POSITIVE_INFINITY, watts: 1500, measured: { kind: 'flow', gpm: 60 } },
      'rpm: not-finite',
    ],
    [
      'watts of another pump',
      { rpm: 3450, watts: 4000, measured: { kind: 'flow', gpm: 60 } },
      'watts: readings-contradict-curve',
    ],
  ] as const)('refuses %s by name', (_, reading, fault) => {
    expect(faultOf(reading)).toBe(fault);
  });
});
