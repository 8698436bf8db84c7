import { describe, expect, it } from 'vitest';
import { seasonGallons } from '#shared/domain/turnover/season-gallons.ts';

const turnovers = [0.5, 0.5, 0.7, 1, 1, 1.2, 1.5, 1.5, 1.2, 1, 0.7, 0.5];

describe('water of the season', () => {
  it('is the month’s turnovers of the pool', () => {
    expect(seasonGallons(turnovers, 20_000, 6)).toBe(30_000);
    expect(seasonGallons(turnovers, 20_000, 11)).toBe(10_000);
  });

  it.each([
    [turnovers, 20_000, 12],
    [turnovers, 20_000, -1],
    [turnovers, 0, 6],
    [turnovers, Number.NaN, 6],
    [turnovers.slice(1), 20_000, 6],
    [turnovers.map(() => -1), 20_000, 6],
    [turnovers.map(() => Number.POSITIVE_INFINITY), 20_000, 6],
  ])('is unknown for %j, %s gallons, month %s', (byMonth, gallons, month) => {
    expect(seasonGallons(byMonth, gallons, month)).toBeUndefined();
  });
});
