import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fitWetEnd } from '#shared/domain/hydraulics/fit-wet-end.ts';
import { headAt, wattsAt } from '#shared/domain/hydraulics/wet-end-curve.ts';
import type { WetEndSheet } from '#shared/domain/hydraulics/wet-end-sheet.ts';
import { fitOrFail, HI_SHEET, POOL_SHEET } from './sample-wet-ends.ts';

const pool = fitOrFail(POOL_SHEET);

const reasons = (sheet: WetEndSheet): string[] => {
  const fit = fitWetEnd(sheet);
  return fit.ok ? [] : fit.refusals.map(({ reason, field }) => `${field}: ${reason}`);
};
const withPoint = (index: number, change: object): WetEndSheet => ({
  ...POOL_SHEET,
  points: POOL_SHEET.points.map((point, place) => (place === index ? { ...point, ...change } : point)),
});

describe('wet-end fit', () => {
  it('gives back the curves that made the points', () => {
    for (const { gpm, feet, watts } of POOL_SHEET.points) {
      expect(headAt(pool, 3450, gpm)).toBeCloseTo(feet, 6);
      expect(wattsAt(pool, 3450, gpm)).toBeCloseTo(watts, 6);
    }
    expect(pool.power).toHaveLength(3);
  });

  it('follows the HI power table within 3 per cent, and 44.5 per cent of the best-efficiency power at 11 per cent of its flow', () => {
    // Source: HI Data Tool, edb table-data/pc-data.csv.
    const curve = fitOrFail(HI_SHEET);
    for (const { gpm, feet, watts } of HI_SHEET.points) {
      expect(Math.abs((wattsAt(curve, 1780, gpm) ?? 0) / watts - 1)).toBeLessThan(0.03);
      // A quadratic cannot follow the knee at the last flow: 5 per cent of the largest head.
      expect(Math.abs((headAt(curve, 1780, gpm) ?? 0) - feet)).toBeLessThan(0.05 * 199);
    }
    expect((wattsAt(curve, 1780, 100) ?? 0) / (wattsAt(curve, 1780, 900) ?? 1)).toBeCloseTo(0.445, 1);
    // Past the best-efficiency flow the table turns over: the fitted curve goes flat there.
    expect((wattsAt(curve, 1780, 1200) ?? 0) / (wattsAt(curve, 1780, 1050) ?? 1)).toBeLessThan(1.02);
  });

  it('does not depend on the order of the points', () => {
    const reversed = fitOrFail({ ...POOL_SHEET, points: [...POOL_SHEET.points].reverse() });

    expect(headAt(reversed, 3450, 33)).toBeCloseTo(headAt(pool, 3450, 33) ?? 0, 6);
  });

  it('fits what drive and motor lose from low-speed points', () => {
    const lost = 60;
    const lowSpeedPoints = [1000, 1700, 2400].map((rpm) => {
      const ratio = rpm / 3450;
      const gpm = 50 * ratio;
      return { rpm, gpm, watts: (wattsAt(pool, rpm, gpm) ?? 0) + lost * (ratio - ratio ** 3) };
    });
    const fitted = fitOrFail({ ...POOL_SHEET, lowSpeedPoints });

    expect(fitted.lossWatts).toBeCloseTo(lost, 6);
    expect(fitted.lossSigmaWatts).toBeLessThan(pool.lossSigmaWatts);
    expect(wattsAt(fitted, 1000, 10)).toBeGreaterThan(wattsAt(pool, 1000, 10) ?? 0);
    expect(wattsAt(fitted, 3450, 10)).toBeCloseTo(wattsAt(pool, 3450, 10) ?? 0, 6);
  });

  it('draws standby at standstill and more than the cube law at low speed', () => {
    expect(wattsAt(pool, 0, 0)).toBe(8);
    expect(wattsAt(pool, 1725, 30)).toBeGreaterThan((wattsAt(pool, 3450, 60) ?? 0) / 8);
  });

  it.each([
    ['three points', { ...POOL_SHEET, points: POOL_SHEET.points.slice(0, 3) }, 'points: fewer-than-four-points'],
    ['a head that rises past shut-off', withPoint(2, { feet: 90 }), 'points[2].feet: head-rises'],
    ['the same flow twice', withPoint(2, { gpm: 20 }), 'points[2].gpm: duplicate-flow'],
    ['a flow that is no number', withPoint(1, { gpm: Number.NaN }), 'points[1].gpm: not-finite'],
    ['an endless head', withPoint(1, { feet: Number.POSITIVE_INFINITY }), 'points[1].feet: not-finite'],
    ['negative watts', withPoint(1, { watts: -20 }), 'points[1].watts: too-small'],
    ['no watts at zero flow, as the HI table misprints', withPoint(0, { watts: 0 }), 'points[0].watts: too-small'],
    ['a negative flow', withPoint(1, { gpm: -5 }), 'points[1].gpm: too-small'],
    ['a negative head', withPoint(5, { feet: -5 }), 'points[5].feet: too-small'],
    ['watts under standby', withPoint(0, { watts: 6 }), 'points[0].watts: watts-under-standby'],
    ['more water power than watts', withPoint(3, { watts: 600 }), 'points[3].watts: more-water-power-than-watts'],
    ['a reference speed of nothing', { ...POOL_SHEET, referenceRpm: 0 }, 'referenceRpm: too-small'],
    ['negative standby', { ...POOL_SHEET, standbyWatts: -1 }, 'standbyWatts: too-small'],
    [
      'a low-speed point above the reference',
      { ...POOL_SHEET, lowSpeedPoints: [{ rpm: 3450, gpm: 20, watts: 900 }] },
      'lowSpeedPoints[0].rpm: speed-above-reference',
    ],
    [
      'a low-speed point beyond the curve',
      { ...POOL_SHEET, lowSpeedPoints: [{ rpm: 1000, gpm: 90, watts: 100 }] },
      'lowSpeedPoints[0].gpm: flow-beyond-curve',
    ],
    [
      'low-speed watts under the cube law',
      { ...POOL_SHEET, lowSpeedPoints: [{ rpm: 2000, gpm: 20, watts: 20 }] },
      'lowSpeedPoints: low-speed-watts-under-cube',
    ],
  ] as const)('refuses %s', (_, sheet, reason) => {
    expect(reasons(sheet)).toContain(reason);
  });

  it('refuses a head that is the same at every flow', () => {
    const flat = { ...POOL_SHEET, points: POOL_SHEET.points.map((point) => ({ ...point, feet: 40 })) };

    expect(reasons(flat)).toEqual(['points: head-rises']);
  });

  it('names every fault at once, each with what is allowed', () => {
    const fit = fitWetEnd({
      referenceRpm: Number.NaN,
      standbyWatts: 8,
      points: [{ gpm: -1, feet: Number.NaN, watts: 0 }],
    });

    expect(fit.ok ? [] : fit.refusals.map(({ field }) => field)).toEqual([
      'referenceRpm',
      'points',
      'points[0].gpm',
      'points[0].feet',
      'points[0].watts',
    ]);
    expect(fit.ok ? [] : fit.refusals.every(({ allowed }) => allowed.length > 10)).toBe(true);
  });

  it('never throws, and whatever it accepts falls in head and stays finite', () => {
    const number = fc.oneof(
      fc.double({ min: -10, max: 2000 }),
      fc.constantFrom(Number.NaN, Number.POSITIVE_INFINITY, 0),
    );
    const point = fc.record({ gpm: number, feet: number, watts: number });
    fc.assert(
      fc.property(fc.array(point, { maxLength: 8 }), number, (points, standbyWatts) => {
        const fit = fitWetEnd({ referenceRpm: 3450, standbyWatts, points });
        if (!fit.ok) {
          expect(fit.refusals.length).toBeGreaterThan(0);
          return;
        }
        const { largestGpm } = fit.value;
        const heads = [0, 0.25, 0.5, 0.75, 1].map((share) => headAt(fit.value, 3450, share * largestGpm) ?? Number.NaN);
        expect(heads.every((feet, index) => index === 0 || feet <= (heads[index - 1] ?? 0) + 1e-6)).toBe(true);
        expect(wattsAt(fit.value, 1700, largestGpm / 3)).toBeGreaterThan(0);
      }),
      { numRuns: 400 },
    );
  });
});
