import fc from 'fast-check';
import { expect, it } from 'vitest';
import { listDayHours } from '#shared/domain/energy/day-hours.ts';
import { listLocalSlices } from '#shared/domain/energy/local-slices.ts';
import { localDay } from '#shared/domain/time/local-days.ts';

const ZONES = ['America/New_York', 'America/Phoenix', 'Europe/Berlin', 'Australia/Lord_Howe', 'Asia/Kathmandu', 'UTC'];

it('gives the hours of any day of any zone as they are cut one by one', () => {
  fc.assert(
    fc.property(fc.constantFrom(...ZONES), fc.integer({ min: 19_000, max: 22_000 }), (zone, epochDay) => {
      const day = localDay(zone, epochDay);
      if (day === undefined) throw new Error(`an unknown zone: ${zone}`);
      expect(listDayHours(zone, day)).toEqual(listLocalSlices(zone, day.from, day.to, 60));
    }),
    { numRuns: 500 },
  );
});
