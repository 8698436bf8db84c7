import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { WET_ENDS } from '#simulator/models.data.ts';
import { dutyGpm } from '#simulator/physics/duty-point.ts';
import { systemFeet } from '#simulator/physics/system-curve.ts';
import { bestShaftWatts, dryShaftWatts, headFeet, shaftWatts } from '#simulator/physics/wet-end.ts';

const wetEnds = Object.entries(WET_ENDS);
const CLEAN = { valve: 1, dirt: 1, staticFeet: 0 };
const rpms = fc.integer({ min: 600, max: 3450 });

describe.each(wetEnds)('%s', (_, wetEnd) => {
  it('obeys the affinity laws: flow with the speed, head with its square, power with its cube', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 1.4, noNaN: true }), rpms, (share, rpm) => {
        const ratio = rpm / wetEnd.referenceRpm;
        const gpm = share * wetEnd.bestGpm;

        expect(headFeet(wetEnd, gpm * ratio, rpm)).toBeCloseTo(
          headFeet(wetEnd, gpm, wetEnd.referenceRpm) * ratio ** 2,
          6,
        );
        expect(shaftWatts(wetEnd, gpm * ratio, rpm)).toBeCloseTo(
          shaftWatts(wetEnd, gpm, wetEnd.referenceRpm) * ratio ** 3,
          6,
        );
      }),
    );
  });

  it('has a head that falls with the flow', () => {
    const heads = [0, 0.2, 0.5, 0.8, 1, 1.2].map((share) => headFeet(wetEnd, share * wetEnd.bestGpm, 3450));

    expect(heads).toEqual([...heads].sort((a, b) => b - a));
    expect(heads[0]).toBe(wetEnd.shutOffFeet);
  });

  it('takes at shut-off the share of its best power that handbooks call typical, and peaks past the best point', () => {
    const best = bestShaftWatts(wetEnd);
    const watts = Array.from({ length: 40 }, (_v, index) => shaftWatts(wetEnd, (index / 20) * wetEnd.bestGpm, 3450));

    // 0.44 of design power at shut-off, more with the specific speed (pump handbook, civilengineeringhandbook.tk).
    expect((watts[0] ?? 0) / best).toBeGreaterThan(0.4);
    expect((watts[0] ?? 0) / best).toBeLessThan(0.55);
    expect(watts.indexOf(Math.max(...watts)) / 20).toBeCloseTo(wetEnd.powerPeakShare, 1);
  });

  it('takes less when it holds air than at shut-off, from the lowest useful speed on', () => {
    fc.assert(
      fc.property(rpms, (rpm) => {
        expect(dryShaftWatts(wetEnd, rpm)).toBeGreaterThan(0);
        if (rpm > 1100) expect(dryShaftWatts(wetEnd, rpm)).toBeLessThan(shaftWatts(wetEnd, 0, rpm));
      }),
    );
  });

  it('meets its system where both heads agree', () => {
    fc.assert(
      fc.property(
        rpms,
        fc.double({ min: 0.002, max: 0.05, noNaN: true }),
        fc.double({ min: 1, max: 8, noNaN: true }),
        (rpm, pipe, dirt) => {
          const curve = { staticFeet: 1, pipe, filter: pipe / 3 };
          const state = { ...CLEAN, dirt };
          const gpm = dutyGpm(wetEnd, curve, state, rpm);

          expect(headFeet(wetEnd, gpm, rpm)).toBeCloseTo(systemFeet(curve, state, gpm), 4);
        },
      ),
    );
  });

  it('moves less through a dirty filter, a throttled valve or against more static head', () => {
    const curve = { staticFeet: 1, pipe: 0.01, filter: 0.004 };
    const gpm = (state: Partial<typeof CLEAN>) => dutyGpm(wetEnd, curve, { ...CLEAN, ...state }, 2400);

    expect(gpm({ dirt: 3 })).toBeLessThan(gpm({}));
    expect(gpm({ valve: 4 })).toBeLessThan(gpm({ valve: 2 }));
    expect(gpm({ staticFeet: 8 })).toBeLessThan(gpm({}));
    expect(gpm({ staticFeet: 400 })).toBe(0);
  });

  it('stands still without speed', () => {
    expect([headFeet(wetEnd, 10, 0), shaftWatts(wetEnd, 10, 0), dryShaftWatts(wetEnd, 0)]).toEqual([0, 0, 0]);
  });
});
