import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ratioForHead, scaleByAffinity } from '#shared/domain/hydraulics/affinity-laws.ts';

describe('affinity laws', () => {
  it('doubles the speed of the DOE handbook pump (HT-03 p. 50; head and power computed)', () => {
    expect(scaleByAffinity({ gpm: 400, feet: 48, watts: 45_000 }, 3600 / 1800)).toEqual({
      gpm: 800,
      feet: 192,
      watts: 360_000,
    });
  });

  // HI Data Tool, example 1: 1740 to 1566 rpm, printed to the foot.
  it.each([
    [200, 206, 180, 167],
    [400, 198, 360, 160],
    [0, 213, 0, 173],
  ])('slows %i gpm at %i ft to the printed %i gpm at %i ft', (gpm, feet, slowGpm, slowFeet) => {
    const slow = scaleByAffinity({ gpm, feet, watts: 1000 }, 1566 / 1740);

    expect(slow?.gpm).toBeCloseTo(slowGpm, 9);
    expect(Math.abs((slow?.feet ?? 0) - slowFeet)).toBeLessThan(0.6);
    expect(slow?.watts).toBeCloseTo(729, 9);
  });

  it('trims the impeller of HI Data Tool example 2 to 9.72 in, and to 1835 gpm at the rounded 9.75 in', () => {
    const ratio = ratioForHead(80, 67) ?? 0;

    expect(10.625 * ratio).toBeCloseTo(9.72, 2);
    expect(scaleByAffinity({ gpm: 2000, feet: 80, watts: 1 }, 9.75 / 10.625)?.gpm).toBeCloseTo(1835, 0);
  });

  it('speeds 1000 rpm up to 1200 (processconvert.com, pump affinity laws; metric units go through)', () => {
    const fast = scaleByAffinity({ gpm: 100, feet: 40, watts: 10 }, 1.2);

    expect(fast?.gpm).toBeCloseTo(120, 9);
    expect(fast?.feet).toBeCloseTo(57.6, 9);
    expect(fast?.watts).toBeCloseTo(17.28, 9);
  });

  it('gives 10, 21 and 33.1 per cent more for 10 per cent more speed (engineeringtoolbox.com, affinity laws)', () => {
    const faster = scaleByAffinity({ gpm: 100, feet: 100, watts: 100 }, 1.1);

    expect(faster?.gpm).toBeCloseTo(110, 9);
    expect(faster?.feet).toBeCloseTo(121, 9);
    expect(faster?.watts).toBeCloseTo(133.1, 9);
  });

  it('takes 0.512 of the power at 20 per cent less speed (computed)', () => {
    expect(scaleByAffinity({ gpm: 1, feet: 1, watts: 1 }, 0.8)?.watts).toBeCloseTo(0.512, 9);
  });

  it('goes there and back', () => {
    const positive = fc.double({ min: 0.01, max: 5, noNaN: true });
    fc.assert(
      fc.property(positive, positive, (gpm, ratio) => {
        const there = scaleByAffinity({ gpm, feet: gpm, watts: gpm }, ratio);
        const back = there && scaleByAffinity(there, 1 / ratio);
        expect(back?.watts).toBeCloseTo(gpm, 6);
      }),
    );
  });

  it.each([0, -1, Number.NaN, Number.POSITIVE_INFINITY])('answers nothing for a ratio of %s', (ratio) => {
    expect(scaleByAffinity({ gpm: 1, feet: 1, watts: 1 }, ratio)).toBeUndefined();
    expect(ratioForHead(80, ratio)).toBeUndefined();
  });
});
