import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { instantOf } from '#shared/domain/time/instant-of.ts';
import { zoneOffsetAt } from '#shared/domain/time/zone-offset.ts';
import { epochDayOf, platformWallTime, TRYING_ZONES } from './zone-oracle.ts';

const minuteOf = (time: string): number => Number(time.slice(0, 2)) * 60 + Number(time.slice(3));
const instant = (zone: string, date: string, time: string): string =>
  new Date(instantOf(zone, epochDayOf(date), minuteOf(time)) ?? Number.NaN).toISOString();

describe('the instant of a wall time', () => {
  it.each([
    ['Europe/Berlin', '2025-03-30', '02:30', '2025-03-30T01:00:00.000Z'],
    ['America/New_York', '2025-03-09', '02:00', '2025-03-09T07:00:00.000Z'],
    ['America/New_York', '2025-03-09', '02:59', '2025-03-09T07:00:00.000Z'],
    ['Australia/Sydney', '2025-10-05', '02:15', '2025-10-04T16:00:00.000Z'],
    ['Australia/Lord_Howe', '2025-10-05', '02:10', '2025-10-04T15:30:00.000Z'],
    ['America/Santiago', '2025-09-07', '00:30', '2025-09-07T04:00:00.000Z'],
    ['America/Havana', '2025-03-09', '00:00', '2025-03-09T05:00:00.000Z'],
  ])('that is skipped (%s %s %s) is the instant of the shift', (zone, date, time, expected) => {
    expect(instant(zone, date, time)).toBe(expected);
  });

  it.each([
    ['Europe/Berlin', '2025-10-26', '02:30', '2025-10-26T00:30:00.000Z'],
    ['America/New_York', '2025-11-02', '01:30', '2025-11-02T05:30:00.000Z'],
    ['Australia/Sydney', '2025-04-06', '02:30', '2025-04-05T15:30:00.000Z'],
    ['Australia/Lord_Howe', '2025-04-06', '01:45', '2025-04-05T14:45:00.000Z'],
    ['Pacific/Auckland', '2025-04-06', '02:00', '2025-04-05T13:00:00.000Z'],
    ['America/Santiago', '2025-04-05', '23:30', '2025-04-06T02:30:00.000Z'],
  ])('that comes twice (%s %s %s) is its first occurrence', (zone, date, time, expected) => {
    expect(instant(zone, date, time)).toBe(expected);
  });

  it('survives a day that a zone left out altogether', () => {
    // Apia went from 29 to 31 December 2011 at midnight (tz database).
    expect(instant('Pacific/Apia', '2011-12-30', '12:00')).toBe('2011-12-30T10:00:00.000Z');
  });

  it('counts minutes before and after the day in the neighbouring days', () => {
    const day = epochDayOf('2025-07-01');
    expect(instantOf('America/Phoenix', day, -30)).toBe(instantOf('America/Phoenix', day - 1, 1410));
    expect(instantOf('America/Phoenix', day, 1440)).toBe(instantOf('America/Phoenix', day + 1, 0));
  });

  it('is undefined for an unknown zone and for a time that is no number', () => {
    expect(instantOf('Mars/Olympus', 20_000, 0)).toBeUndefined();
    expect(instantOf('UTC', Number.NaN, 0)).toBeUndefined();
  });

  it('shows the wall time asked for, at the first instant that does, or is the shift that skips it', () => {
    const days = fc.integer({ min: epochDayOf('2013-01-01'), max: epochDayOf('2035-12-31') });
    fc.assert(
      fc.property(fc.constantFrom(...TRYING_ZONES), days, fc.integer({ min: 0, max: 1439 }), (zone, day, minute) => {
        const at = instantOf(zone, day, minute) ?? Number.NaN;
        const shown = platformWallTime(zone, at);
        const asked = { date: new Date(day * 86_400_000).toISOString().slice(0, 10), minute };
        if (shown.date === asked.date && minuteOf(shown.time.slice(0, 5)) === asked.minute) {
          const before = zoneOffsetAt(zone, at - 3_600_000 * 1.5) ?? 0;
          const gained = before - (zoneOffsetAt(zone, at) ?? 0);
          // Had the wall shown it before, the clock would have been set back since, by just that much.
          if (gained > 0) expect(platformWallTime(zone, at - gained * 60_000).time).not.toBe(shown.time);
        } else {
          expect(zoneOffsetAt(zone, at)).toBeGreaterThan(zoneOffsetAt(zone, at - 1) ?? Number.NaN);
        }
      }),
      { numRuns: 2000 },
    );
  });
});
