import { describe, expect, it } from 'vitest';
import { largestFiltrationGpm, turnoverGpm, turnoverHours, turnovers } from '#shared/domain/turnover/turnover-rate.ts';

describe('turnover', () => {
  // Sources: thepoolclass.com turnover-rate (result computed) · caligrafia.org what-is-pool-turnover-rate ·
  // calculator.academy (its formula line is a trap; the example is right).
  it.each([
    [65_000, 240, 4.514],
    [90_000, 180, 8.333],
    [20_000, 300, 1.111],
  ])('of %i gallons at %i gpm takes %s hours', (gallons, gpm, hours) => {
    expect(turnoverHours(gallons, gpm)).toBeCloseTo(hours, 3);
  });

  it('of 23,936 gallons in 360 minutes takes 66.49 gpm (caligrafia.org)', () => {
    expect(turnoverGpm(23_936, 360)).toBeCloseTo(66.49, 2);
  });

  // Source: mfgcalcs.com, water-turnover-rate.
  it.each([
    [60, 2.16],
    [150, 5.4],
  ])('at %i gpm for 720 minutes turns 20,000 gallons over %s times', (gpm, times) => {
    expect(turnovers(gpm * 720, 20_000)).toBeCloseTo(times, 9);
  });

  it('is held in California to the greater of the volume in 6 h and 36 gpm (§150.0(p)); 12,960 gallons are both', () => {
    expect(largestFiltrationGpm(12_960)).toBeCloseTo(36, 9);
    expect(largestFiltrationGpm(8000)).toBe(36);
    expect(largestFiltrationGpm(13_000)).toBeCloseTo(36.1, 1);
  });

  it.each([Number.NaN, Number.POSITIVE_INFINITY, 0, -1])('answers nothing for %s', (bad) => {
    expect(turnoverHours(bad, 60)).toBeUndefined();
    expect(turnoverHours(20_000, bad)).toBeUndefined();
    expect(turnoverGpm(20_000, bad)).toBeUndefined();
    expect(turnovers(100, bad)).toBeUndefined();
    expect(largestFiltrationGpm(bad)).toBeUndefined();
  });
});
