import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { estimateFlow } from '#shared/domain/hydraulics/estimate-flow.ts';
import { METER_AS_FITTED, METER_CHECKED } from '#shared/domain/hydraulics/meter-error.ts';
import { wattsAt } from '#shared/domain/hydraulics/wet-end-curve.ts';
import { horsepowerToWatts } from '#shared/units/power.ts';
import { fitOrFail, HI_SHEET, POOL_SHEET } from './sample-wet-ends.ts';

const pool = fitOrFail(POOL_SHEET);
const hi = fitOrFail(HI_SHEET);

describe('flow from watts', () => {
  it('reads back the flow that made the watts', () => {
    for (const gpm of [15, 40, 60, 80]) {
      const answer = estimateFlow(pool, { rpm: 3450, watts: wattsAt(pool, 3450, gpm) ?? 0 }, METER_CHECKED);

      expect(answer).toMatchObject({ kind: 'estimate', from: 'watts' });
      expect(answer.kind === 'estimate' && answer.gpm).toBeCloseTo(gpm, 6);
      expect(answer.kind === 'estimate' && answer.k).toBeCloseTo((84 - 0.05 * gpm - 0.0045 * gpm ** 2) / gpm ** 2, 6);
    }
  });

  it('is less sure with a meter nobody checked', () => {
    const reading = { rpm: 3450, watts: 1500 };
    const [fitted, checked] = [METER_AS_FITTED, METER_CHECKED].map((meter) => estimateFlow(pool, reading, meter));

    expect(
      fitted?.kind === 'estimate' && checked?.kind === 'estimate' && fitted.sigmaGpm > 1.5 * checked.sigmaGpm,
    ).toBe(true);
  });

  it('holds the local slope: sigma of flow is sigma of watts over watts per gpm', () => {
    const sharp = { ...pool, powerSigmaShare: 0, lossSigmaWatts: 0 };
    const answer = estimateFlow(sharp, { rpm: 3450, watts: wattsAt(pool, 3450, 50) ?? 0 }, { share: 0, watts: 10 });

    expect(answer.kind === 'estimate' && answer.sigmaGpm).toBeCloseTo(10 / (12 - 0.06 * 50), 1);
  });

  it('cannot tell at low speed', () => {
    const answer = estimateFlow(pool, { rpm: 1000, watts: wattsAt(pool, 1000, 15) ?? 0 }, METER_AS_FITTED);

    expect(answer).toEqual({ kind: 'cannot-tell', because: 'low-speed' });
  });

  it('cannot tell where the HI power table peaks and turns over (1000 to 1200 gpm, 46.5 to 48.2 hp)', () => {
    // Source: HI Data Tool, edb table-data/pc-data.csv.
    const answer = estimateFlow(hi, { rpm: 1780, watts: horsepowerToWatts(47) }, METER_CHECKED);

    expect(answer.kind).toBe('cannot-tell');
    expect(['turning-over', 'flat-curve']).toContain(answer.kind === 'cannot-tell' && answer.because);
    expect(estimateFlow(hi, { rpm: 1780, watts: horsepowerToWatts(25) }, METER_CHECKED).kind).toBe('estimate');
  });

  it('names a curve that turns over, where two flows give the same watts', () => {
    const humped = { ...pool, power: [900, 20, -0.18] };
    const watts = 8 + 900 + 20 * 30 - 0.18 * 900;

    expect(estimateFlow(humped, { rpm: 3450, watts }, METER_CHECKED)).toEqual({
      kind: 'cannot-tell',
      because: 'turning-over',
    });
  });

  it('cannot tell on a curve whose watts do not change', () => {
    expect(estimateFlow({ ...pool, power: [1000, 0.1] }, { rpm: 3450, watts: 1010 }, METER_CHECKED)).toEqual({
      kind: 'cannot-tell',
      because: 'flat-curve',
    });
  });

  it('says under or over the curve for a load the curve does not have', () => {
    expect(estimateFlow(pool, { rpm: 3450, watts: 400 }, METER_CHECKED)).toEqual({
      kind: 'cannot-tell',
      because: 'under-curve',
    });
    expect(estimateFlow(pool, { rpm: 3450, watts: 3000 }, METER_CHECKED)).toEqual({
      kind: 'cannot-tell',
      because: 'over-curve',
    });
  });

  it('takes a reading just past an end for that end, with no k at no flow', () => {
    const shutOff = estimateFlow(pool, { rpm: 3450, watts: 940 }, METER_CHECKED);

    expect(shutOff).toMatchObject({ kind: 'estimate', gpm: 0, k: undefined, sigmaK: undefined });
  });

  it('says nothing of a pump that stands', () => {
    expect(estimateFlow(pool, { rpm: 0, watts: 8 }, METER_CHECKED)).toEqual({
      kind: 'cannot-tell',
      because: 'standing',
    });
  });

  it.each([
    [Number.NaN, 1500, 'rpm'],
    [-5, 1500, 'rpm'],
    [9000, 1500, 'rpm'],
    [3450, Number.NaN, 'watts'],
    [3450, -1, 'watts'],
    [3450, Number.POSITIVE_INFINITY, 'watts'],
  ])('refuses %s rpm and %s W by naming %s', (rpm, watts, field) => {
    expect(estimateFlow(pool, { rpm, watts }, METER_CHECKED)).toMatchObject({ kind: 'refused', field });
  });

  it('gives finite figures or none, whatever it reads', () => {
    const number = fc.oneof(fc.double(), fc.double({ min: 0, max: 4000 }));
    fc.assert(
      fc.property(
        number,
        number,
        fc.constantFrom(pool, hi),
        fc.double({ min: -20, max: 20, noNaN: true }),
        (rpm, watts, curve, staticFeet) => {
          const answer = estimateFlow(curve, { rpm, watts }, METER_AS_FITTED, staticFeet);
          if (answer.kind !== 'estimate') return;
          const { gpm, sigmaGpm, feet, sigmaFeet, k, sigmaK } = answer;
          expect([gpm, sigmaGpm, feet, sigmaFeet].every((value) => Number.isFinite(value))).toBe(true);
          expect([k ?? 0, sigmaK ?? 0].every(Number.isFinite)).toBe(true);
          expect(gpm).toBeGreaterThanOrEqual(0);
          expect(sigmaGpm).toBeGreaterThan(0);
        },
      ),
      { numRuns: 500 },
    );
  });

  it('reads more flow from more watts at one speed', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 2400, max: 3450, noNaN: true }),
        fc.double({ min: 5, max: 80, noNaN: true }),
        (rpm, gpm) => {
          const flow = (gpm * rpm) / 3450;
          const read = (watts: number): number => {
            const answer = estimateFlow(pool, { rpm, watts }, METER_CHECKED);
            return answer.kind === 'estimate' ? answer.gpm : Number.NaN;
          };
          const watts = wattsAt(pool, rpm, flow) ?? 0;
          expect(read(watts * 1.01)).toBeGreaterThan(read(watts));
        },
      ),
    );
  });

  it('holds the true flow within two sigmas nine times out of ten, for pumps and meters off as they are built', () => {
    let [inside, asked] = [0, 0];
    const gauss = (pair: readonly [number, number]): number =>
      Math.sqrt(-2 * Math.log(1 - pair[0])) * Math.cos(2 * Math.PI * pair[1]);
    const chance = fc.double({ min: 0, max: 1, maxExcluded: true, noNaN: true });
    const draw = fc.tuple(chance, chance);
    fc.assert(
      fc.property(
        draw,
        draw,
        fc.double({ min: 2500, max: 3450, noNaN: true }),
        fc.double({ min: 10, max: 90, noNaN: true }),
        (meter, built, rpm, gpm) => {
          const flow = (gpm * rpm) / 3450;
          const watts = ((wattsAt(pool, rpm, flow) ?? 0) - 8) * (1 + 0.03 * gauss(built)) + 8;
          const answer = estimateFlow(pool, { rpm, watts: watts * (1 + 0.05 * gauss(meter)) }, METER_AS_FITTED);
          if (answer.kind !== 'estimate') return;
          asked += 1;
          if (Math.abs(answer.gpm - flow) <= 2 * answer.sigmaGpm) inside += 1;
        },
      ),
      { numRuns: 3000, seed: 1, endOnFailure: true },
    );
    expect(asked).toBeGreaterThan(1500);
    expect(inside / asked).toBeGreaterThan(0.9);
  });
});
