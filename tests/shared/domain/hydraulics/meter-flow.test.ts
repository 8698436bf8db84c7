import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findDutyPoint } from '#shared/domain/hydraulics/duty-point.ts';
import { estimateFlow } from '#shared/domain/hydraulics/estimate-flow.ts';
import { METER_AS_FITTED, METER_CHECKED } from '#shared/domain/hydraulics/meter-error.ts';
import { meterFlow } from '#shared/domain/hydraulics/meter-flow.ts';
import { scaleFlow } from '#shared/domain/hydraulics/scale-flow.ts';
import { estimateDaySystem } from '#shared/domain/hydraulics/system-estimate.ts';
import { fitOrFail, POOL_SHEET } from './sample-wet-ends.ts';

const pool = fitOrFail(POOL_SHEET);
const system = { staticFeet: 0, k: 0.0125 };
const dutyWatts = (rpm: number): number => {
  const duty = findDutyPoint(pool, rpm, system);
  return duty.kind === 'duty' ? duty.watts : Number.NaN;
};
const fast = estimateFlow(pool, { rpm: 3450, watts: dutyWatts(3450) }, METER_CHECKED);
const day = estimateDaySystem([{ speedRatio: 1, milliseconds: 3_600_000, flow: fast }], 0);

describe('virtual flow meter', () => {
  it('learns the k of the day from its fast runs, no surer than they are', () => {
    expect(day?.k).toBeCloseTo(0.0125, 6);
    expect(day?.sigmaK).toBeCloseTo((fast.kind === 'estimate' && fast.sigmaK) || 0, 9);

    const twice = { speedRatio: 1, milliseconds: 7_200_000, flow: fast };
    expect(estimateDaySystem([twice, twice], 0)?.sigmaK).toBeCloseTo(day?.sigmaK ?? 0, 9);
  });

  it('learns nothing from slow runs, from answers that cannot tell, or from no time', () => {
    expect(
      estimateDaySystem(
        [
          { speedRatio: 0.4, milliseconds: 3_600_000, flow: fast },
          { speedRatio: 1, milliseconds: 3_600_000, flow: { kind: 'cannot-tell', because: 'flat-curve' } },
          { speedRatio: 1, milliseconds: Number.NaN, flow: fast },
        ],
        0,
      ),
    ).toBeUndefined();
  });

  it('scales the flow of the day to a low speed, where the watts alone cannot tell', () => {
    const reading = { rpm: 1000, watts: dutyWatts(1000) };
    const alone = meterFlow({ curve: pool, meter: METER_AS_FITTED, staticFeet: 0 }, reading);
    const withDay = meterFlow({ curve: pool, meter: METER_AS_FITTED, staticFeet: 0, daySystem: day }, reading);

    expect(alone).toEqual({ kind: 'cannot-tell', because: 'low-speed' });
    expect(withDay).toMatchObject({ kind: 'estimate', from: 'system' });
    const top = fast.kind === 'estimate' ? fast.gpm : Number.NaN;
    expect(withDay.kind === 'estimate' && withDay.gpm).toBeCloseTo((top * 1000) / 3450, 6);
  });

  it('believes the watts at high speed', () => {
    expect(
      meterFlow(
        { curve: pool, meter: METER_CHECKED, staticFeet: 0, daySystem: day },
        { rpm: 3450, watts: dutyWatts(3450) },
      ),
    ).toMatchObject({ kind: 'estimate', from: 'watts' });
  });

  it('does not let the day hide a load that is under the curve', () => {
    expect(
      meterFlow({ curve: pool, meter: METER_CHECKED, staticFeet: 0, daySystem: day }, { rpm: 3450, watts: 300 }),
    ).toEqual({ kind: 'cannot-tell', because: 'under-curve' });
  });

  it('refuses a bad reading and a bad sigma by name', () => {
    const meter = { curve: pool, meter: METER_CHECKED, staticFeet: 0, daySystem: day };

    expect(meterFlow(meter, { rpm: 1000, watts: Number.NaN })).toMatchObject({ kind: 'refused', field: 'watts' });
    expect(scaleFlow(pool, 1000, { ...system, sigmaK: Number.NaN })).toMatchObject({
      kind: 'refused',
      field: 'system.sigmaK',
    });
  });

  it('cannot tell where pump and system do not meet', () => {
    expect(scaleFlow(pool, 3450, { staticFeet: 0, k: 1e-7, sigmaK: 0 })).toEqual({
      kind: 'cannot-tell',
      because: 'no-duty-point',
    });
    expect(scaleFlow(pool, 0, { ...system, sigmaK: 0 })).toEqual({ kind: 'cannot-tell', because: 'standing' });
  });

  it('is in proportion to speed without static head', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 600, max: 3450, noNaN: true }),
        fc.double({ min: 0.006, max: 0.5, noNaN: true }),
        (rpm, k) => {
          const at = (speed: number) => scaleFlow(pool, speed, { staticFeet: 0, k, sigmaK: k / 10 });
          const [top, slow] = [at(3450), at(rpm)];
          if (top.kind !== 'estimate' || slow.kind !== 'estimate') throw new Error('both must meet');
          expect(slow.gpm / rpm).toBeCloseTo(top.gpm / 3450, 8);
          expect(slow.sigmaGpm / slow.gpm).toBeCloseTo(top.sigmaGpm / top.gpm, 6);
        },
      ),
    );
  });

  it('has a sigma that a small change of k bears out', () => {
    const [low, high] = [0.0125 * 0.99, 0.0125 * 1.01].map((k) => findDutyPoint(pool, 3450, { staticFeet: 0, k }));
    const moved = low?.kind === 'duty' && high?.kind === 'duty' ? (low.gpm - high.gpm) / 2 : Number.NaN;
    const sharp = { ...pool, headSigmaFeet: 0 };
    const scaled = scaleFlow(sharp, 3450, { ...system, sigmaK: 0.0125 * 0.01 });

    expect(scaled.kind === 'estimate' && scaled.sigmaGpm).toBeCloseTo(moved, 4);
  });
});
