import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { isKnownZone } from '#shared/domain/time/is-known-zone.ts';
import { localTime } from '#shared/domain/time/local-time.ts';
import { offsetSpanAt, zoneOffsetAt } from '#shared/domain/time/zone-offset.ts';
import { epochDayOf, platformWallTime, TRYING_ZONES } from './zone-oracle.ts';

const WEEKDAYS = ['Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday', 'Sunday'];
const instants = fc.integer({ min: Date.UTC(2012, 0, 1), max: Date.UTC(2036, 0, 1) });
const zones = fc.constantFrom(...TRYING_ZONES);

describe('zone offset', () => {
  // Shifts as the tz database publishes them (releases to 2025a): the last second before and the first after.
  it.each([
    ['Europe/Berlin', '2025-03-30T01:00:00Z', 60, 120],
    ['Europe/Berlin', '2025-10-26T01:00:00Z', 120, 60],
    ['America/New_York', '2025-03-09T07:00:00Z', -300, -240],
    ['America/New_York', '2025-11-02T06:00:00Z', -240, -300],
    ['Australia/Sydney', '2025-04-05T16:00:00Z', 660, 600],
    ['Australia/Sydney', '2025-10-04T16:00:00Z', 600, 660],
    ['Australia/Lord_Howe', '2025-04-05T15:00:00Z', 660, 630],
    ['Australia/Lord_Howe', '2025-10-04T15:30:00Z', 630, 660],
    ['Pacific/Auckland', '2025-04-05T14:00:00Z', 780, 720],
    ['Pacific/Auckland', '2025-09-27T14:00:00Z', 720, 780],
    ['America/Santiago', '2025-04-06T03:00:00Z', -180, -240],
    ['America/Santiago', '2025-09-07T04:00:00Z', -240, -180],
    ['Africa/Casablanca', '2025-02-23T02:00:00Z', 60, 0],
    ['Africa/Casablanca', '2025-04-06T02:00:00Z', 0, 60],
    ['America/Havana', '2025-03-09T05:00:00Z', -300, -240],
  ])('of %s shifts at %s from %d to %d min', (zone, at, before, after) => {
    const shift = Date.parse(at);
    expect(zoneOffsetAt(zone, shift - 1)).toBe(before);
    expect(zoneOffsetAt(zone, shift)).toBe(after);
  });

  it('of America/Phoenix is the same all year', () => {
    for (let day = 0; day < 365; day += 1)
      expect(zoneOffsetAt('America/Phoenix', Date.UTC(2025, 0, 1 + day))).toBe(-420);
  });

  it('is undefined for an unknown zone, for a bare offset and for an instant that is no time', () => {
    expect(zoneOffsetAt('Mars/Olympus', 0)).toBeUndefined();
    expect(zoneOffsetAt('+02:00', 0)).toBeUndefined();
    expect(zoneOffsetAt('UTC', Number.NaN)).toBeUndefined();
    expect(zoneOffsetAt('UTC', 1e16)).toBeUndefined();
    expect(localTime('Mars/Olympus', 0)).toBeUndefined();
  });

  it('stays the same throughout its span', () => {
    fc.assert(
      fc.property(zones, instants, fc.double({ min: 0, max: 1, noNaN: true }), (zone, at, share) => {
        const span = offsetSpanAt(zone, at);
        if (span === undefined) throw new Error(`${zone} is known`);
        expect(span.from <= at && at < span.to).toBe(true);
        const inside = Math.floor(span.from + share * (span.to - 1 - span.from));
        expect(zoneOffsetAt(zone, inside)).toBe(span.offsetMinutes);
      }),
    );
  });

  it('gives the wall time that the platform shows, for any zone and instant', () => {
    fc.assert(
      fc.property(zones, instants, (zone, at) => {
        const local = localTime(zone, at);
        const shown = platformWallTime(zone, at);
        expect(local?.epochDay).toBe(epochDayOf(shown.date));
        expect(WEEKDAYS[local?.weekday ?? -1]).toBe(shown.weekday);
        const [hours = 0, minutes = 0, seconds = 0] = shown.time.split(':').map(Number);
        expect(Math.floor(local?.minute ?? -1)).toBe(hours * 60 + minutes);
        expect(local?.second).toBe(seconds);
      }),
      { numRuns: 2000 },
    );
  });
});

describe('a known zone', () => {
  it('is an IANA name, whatever its kind', () => {
    for (const zone of [...TRYING_ZONES, 'Etc/GMT+5', 'US/Arizona']) expect(isKnownZone(zone)).toBe(true);
  });

  it('is no bare offset, no invented name, no empty text', () => {
    for (const zone of ['+05:00', '-07', 'Mars/Olympus', 'Mars+05:00', '', 'America/'])
      expect(isKnownZone(zone)).toBe(false);
  });
});
