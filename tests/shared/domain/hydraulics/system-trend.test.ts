import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findSystemTrend } from '#shared/domain/hydraulics/system-trend.ts';

const days = (sharePerDay: number, noise: (day: number) => number = () => 0) =>
  Array.from({ length: 21 }, (_, day) => ({
    day,
    k: 0.0125 * Math.exp(sharePerDay * day + noise(day)),
    sigmaK: 0.001,
  }));

describe('trend of k', () => {
  it('finds the growth that made the days', () => {
    const trend = findSystemTrend(days(0.012));

    expect(trend).toMatchObject({ kind: 'trend', days: 21, direction: 'rising' });
    expect(trend.kind === 'trend' && trend.sharePerDay).toBeCloseTo(0.012, 9);
    expect(trend.kind === 'trend' && trend.riseShare).toBeCloseTo(Math.expm1(0.24), 9);
  });

  it('calls days that are all alike steady, and so days that only scatter', () => {
    expect(findSystemTrend(days(0))).toMatchObject({ direction: 'steady' });
    expect(findSystemTrend(days(0, (day) => (day % 2 === 0 ? 0.05 : -0.05)))).toMatchObject({ direction: 'steady' });
  });

  it('finds a fall', () => {
    expect(findSystemTrend(days(-0.02))).toMatchObject({ direction: 'falling' });
  });

  it('cannot tell from four days, from one day five times, or from days that are no numbers', () => {
    const none = { kind: 'cannot-tell', because: 'too-few-days' };

    expect(findSystemTrend(days(0.01).slice(0, 4))).toEqual(none);
    expect(findSystemTrend(days(0.01).map((one) => ({ ...one, day: 3 })))).toEqual(none);
    expect(findSystemTrend(days(0.01).map((one) => ({ ...one, k: Number.NaN })))).toEqual(none);
    expect(findSystemTrend([])).toEqual(none);
  });

  it('does not depend on the order of the days, nor on where the count starts', () => {
    fc.assert(
      fc.property(fc.integer({ min: -1000, max: 20_000 }), (start) => {
        const shifted = days(0.01, (day) => 0.02 * Math.sin(day)).map((one) => ({ ...one, day: one.day + start }));
        const [forward, backward] = [findSystemTrend(shifted), findSystemTrend([...shifted].reverse())];
        if (forward.kind !== 'trend' || backward.kind !== 'trend') throw new Error('must be trends');
        expect(backward.sharePerDay).toBeCloseTo(forward.sharePerDay, 9);
        expect(forward.sharePerDay).toBeCloseTo(0.01, 2);
      }),
    );
  });
});
