import { describe, expect, it } from 'vitest';
import {
  atmosphereFeet,
  netPositiveSuctionHead,
  vapourPressureFeet,
} from '#shared/domain/hydraulics/net-positive-suction-head.ts';

describe('net positive suction head available', () => {
  // Sources: civilengineeringhandbook.tk, NPSHA 35.061 feet (first), the same page's data (second, result computed),
  // Practical Pumping Handbook p. 82 (third, sum computed).
  it.each([
    [33.9, 6, 0.839, 4, 35.061],
    [26.2, -8, 0.411, 3, 14.789],
    [45, 34.474, 6.775, 0.378, 72.321],
  ])(
    'of %s ft air, %s ft static, %s ft vapour and %s ft lost is %s ft',
    (atmosphere, staticFeet, vapourFeet, lossFeet, available) => {
      expect(netPositiveSuctionHead({ atmosphereFeet: atmosphere, staticFeet, vapourFeet, lossFeet })).toBeCloseTo(
        available,
        3,
      );
    },
  );

  it('knows the vapour pressure of pool water (HI engineering data book: 0.36336 psia at 70 °F, 0.95051 at 100 °F)', () => {
    expect(vapourPressureFeet(70)).toBeCloseTo(0.36336 * 2.3108, 3);
    expect(vapourPressureFeet(100)).toBeCloseTo(0.95051 * 2.3108, 3);
    expect(vapourPressureFeet(85)).toBeGreaterThan(vapourPressureFeet(80) ?? 99);
    expect(vapourPressureFeet(60)).toBeCloseTo(0.2564 * 2.3108, 3);
    expect(vapourPressureFeet(59)).toBeUndefined();
    expect(vapourPressureFeet(Number.NaN)).toBeUndefined();
  });

  it('has 33.9 ft of air at sea level and 26.2 ft at 7,000 ft (civilengineeringhandbook.tk)', () => {
    expect(atmosphereFeet(0)).toBeCloseTo(33.9, 9);
    expect(Math.abs((atmosphereFeet(7000) ?? 0) - 26.2)).toBeLessThan(0.1);
    expect(atmosphereFeet(Number.NaN)).toBeUndefined();
  });

  it('answers nothing for numbers that cannot be', () => {
    const side = { atmosphereFeet: 33.9, staticFeet: 6, vapourFeet: 0.8, lossFeet: 4 };

    expect(netPositiveSuctionHead({ ...side, lossFeet: -1 })).toBeUndefined();
    expect(netPositiveSuctionHead({ ...side, staticFeet: Number.POSITIVE_INFINITY })).toBeUndefined();
  });
});
