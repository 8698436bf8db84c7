import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { clockDifference } from '#shared/domain/time/clock-time.ts';
import { localDay, localDayAt, localDays } from '#shared/domain/time/local-days.ts';
import { epochDayOf, platformWallTime, TRYING_ZONES } from './zone-oracle.ts';

const hours = (zone: string, date: string): number => {
  const day = localDay(zone, epochDayOf(date));
  return day === undefined ? Number.NaN : (day.to - day.from) / 3_600_000;
};

describe('local days', () => {
  it.each([
    ['America/New_York', '2025-03-09', 23],
    ['America/New_York', '2025-11-02', 25],
    ['Australia/Sydney', '2025-10-05', 23],
    ['Australia/Sydney', '2025-04-06', 25],
    ['Australia/Lord_Howe', '2025-10-05', 23.5],
    ['Australia/Lord_Howe', '2025-04-06', 24.5],
    ['America/Santiago', '2025-09-07', 23],
    ['America/Santiago', '2025-04-05', 25],
    ['America/Phoenix', '2025-03-09', 24],
    ['Africa/Casablanca', '2025-02-23', 25],
  ])('of %s: %s lasts %d h', (zone, date, expected) => {
    expect(hours(zone, date)).toBe(expected);
  });

  it('begin where the platform turns the date, and follow one another without a gap', () => {
    const days = fc.integer({ min: epochDayOf('2013-01-01'), max: epochDayOf('2035-12-01') });
    fc.assert(
      fc.property(fc.constantFrom(...TRYING_ZONES), days, (zone, first) => {
        const from = localDay(zone, first)?.from ?? Number.NaN;
        const to = localDay(zone, first + 30)?.from ?? Number.NaN;
        const listed = localDays(zone, from, to);
        expect(listed.map(({ epochDay }) => epochDay)).toEqual(Array.from({ length: 30 }, (_, index) => first + index));
        for (const [index, day] of listed.entries()) {
          expect(day.from).toBe(index === 0 ? from : listed[index - 1]?.to);
          expect(epochDayOf(platformWallTime(zone, day.from).date)).toBe(day.epochDay);
          expect(epochDayOf(platformWallTime(zone, day.from - 1).date)).toBe(day.epochDay - 1);
        }
      }),
      { numRuns: 60 },
    );
  });

  it('include a day that is only touched, and leave out one that only borders', () => {
    const day = localDayAt('America/Phoenix', Date.UTC(2025, 6, 1, 13));
    expect(day).toEqual({ epochDay: 20_270, from: Date.UTC(2025, 6, 1, 7), to: Date.UTC(2025, 6, 2, 7) });
    expect(localDays('America/Phoenix', day?.from ?? 0, day?.to ?? 0)).toEqual([day]);
    expect(localDays('America/Phoenix', day?.from ?? 0, (day?.to ?? 0) + 1)).toHaveLength(2);
  });

  it('leave out a day that a zone skipped', () => {
    const listed = localDays('Pacific/Apia', Date.UTC(2011, 11, 29, 12), Date.UTC(2011, 11, 31, 12));
    expect(listed.map(({ epochDay }) => epochDay)).toEqual([
      epochDayOf('2011-12-29'),
      epochDayOf('2011-12-31'),
      epochDayOf('2012-01-01'),
    ]);
  });

  it('are none for an empty stretch, a stretch that is no time, and an unknown zone', () => {
    expect(localDays('UTC', 5, 5)).toEqual([]);
    expect(localDays('UTC', Number.NaN, 5)).toEqual([]);
    expect(localDays('Mars/Olympus', 0, 1e9)).toEqual([]);
  });
});

describe('the way round the clock', () => {
  it('is the shorter one, forward positive', () => {
    expect(clockDifference(1430, 10)).toBe(20);
    expect(clockDifference(10, 1430)).toBe(-20);
    expect(clockDifference(0, 720)).toBe(720);
    expect(clockDifference(100, 100)).toBe(0);
  });
});
