import fc from 'fast-check';
import { polynomialRoot } from 'mathjs';
import { describe, expect, it } from 'vitest';
import { findDutyPoint } from '#shared/domain/hydraulics/duty-point.ts';
import { systemHead } from '#shared/domain/hydraulics/system-curve.ts';
import { headAt, wattsAt } from '#shared/domain/hydraulics/wet-end-curve.ts';
import { fitOrFail, HI_COMBINED, POOL_SHEET } from './sample-wet-ends.ts';

const pool = fitOrFail(POOL_SHEET);

describe('duty point', () => {
  it('meets the system at 200 gpm and 296 ft (HI Data Tool, 03_combined)', () => {
    const duty = findDutyPoint(HI_COMBINED, 1780, { staticFeet: 265, k: 7.75e-4 });

    expect(duty).toMatchObject({ kind: 'duty', beyondPoints: false });
    expect(duty.kind === 'duty' && duty.gpm).toBeCloseTo(200, 0);
    expect(duty.kind === 'duty' && duty.feet).toBeCloseTo(296, 0);
  });

  it('falls to 190.6 gpm when the static head rises to 275 ft (HI Data Tool, 03_combined)', () => {
    const duty = findDutyPoint(HI_COMBINED, 1780, { staticFeet: 275, k: 7.75e-4 });

    expect(duty.kind === 'duty' && duty.gpm).toBeCloseTo(190.62, 1);
  });

  it('says beyond the curve, and where the curve ends, when the system asks for too little', () => {
    expect(findDutyPoint(pool, 3450, { staticFeet: 0, k: 1e-6 })).toEqual({
      kind: 'beyond-curve',
      endGpm: pool.endGpm,
    });
  });

  it('moves no water when standing, or when it cannot lift the static head', () => {
    expect(findDutyPoint(pool, 0, { staticFeet: 0, k: 0.01 })).toEqual({
      kind: 'no-flow',
      because: 'standing',
      watts: 8,
    });
    expect(findDutyPoint(pool, 1000, { staticFeet: 60, k: 0.01 })).toMatchObject({
      kind: 'no-flow',
      because: 'static-head-above-shut-off',
    });
  });

  it.each([
    [Number.NaN, 0, 0.01, 'rpm'],
    [-1, 0, 0.01, 'rpm'],
    [3450, Number.POSITIVE_INFINITY, 0.01, 'system'],
    [3450, 0, 0, 'system'],
    [3450, 0, -0.01, 'system'],
    [3450, 0, Number.NaN, 'system'],
  ])('refuses %s rpm on a system of %s ft and k %s by naming %s', (rpm, staticFeet, k, field) => {
    expect(findDutyPoint(pool, rpm, { staticFeet, k })).toMatchObject({ kind: 'refused', field });
  });

  const rpms = fc.double({ min: 600, max: 3450, noNaN: true });
  const ks = fc.double({ min: 0.006, max: 0.5, noNaN: true });

  it('lies on both curves', () => {
    fc.assert(
      fc.property(
        rpms,
        fc.double({ min: 0.012, max: 0.5, noNaN: true }),
        fc.double({ min: -0.5, max: 1.5, noNaN: true }),
        (rpm, k, staticFeet) => {
          const system = { staticFeet, k };
          const duty = findDutyPoint(pool, rpm, system);
          expect(duty.kind).toBe('duty');
          if (duty.kind !== 'duty') return;
          expect(headAt(pool, rpm, duty.gpm)).toBeCloseTo(duty.feet, 6);
          expect(systemHead(system, duty.gpm)).toBeCloseTo(duty.feet, 6);
          expect(wattsAt(pool, rpm, duty.gpm)).toBeCloseTo(duty.watts, 6);
        },
      ),
    );
  });

  it('finds the root a general library finds', () => {
    fc.assert(
      fc.property(rpms, ks, (rpm, k) => {
        const ratio = rpm / pool.referenceRpm;
        const [a = 0, b = 0, c = 0] = pool.head;
        const roots = polynomialRoot(a * ratio ** 2, b * ratio, c - k) as number[];
        const expected = Math.max(...roots);
        const duty = findDutyPoint(pool, rpm, { staticFeet: 0, k });
        expect(duty.kind === 'duty' && duty.gpm).toBeCloseTo(expected, 6);
      }),
    );
  });

  it('moves more water the faster it turns, and less the more the pipes hold back', () => {
    fc.assert(
      fc.property(rpms, ks, (rpm, k) => {
        const at = (speed: number, resistance: number): number => {
          const duty = findDutyPoint(pool, speed, { staticFeet: 0, k: resistance });
          return duty.kind === 'duty' ? duty.gpm : Number.NaN;
        };
        expect(at(rpm * 1.02, k)).toBeGreaterThan(at(rpm, k));
        expect(at(rpm, k * 1.02)).toBeLessThan(at(rpm, k));
      }),
    );
  });
});
