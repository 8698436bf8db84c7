import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { listHourUsage } from '#shared/domain/energy/hour-usage.ts';
import { listLocalSlices } from '#shared/domain/energy/local-slices.ts';
import { localDayAt } from '#shared/domain/time/local-days.ts';
import { sampleRun } from '#tests/shared/domain/turnover/sample-runs.ts';

const HOUR = 3_600_000;
const dayOf = (zone: string, at: number) => {
  const day = localDayAt(zone, at);
  if (day === undefined) throw new Error('known zone');
  return day;
};

describe('local slices', () => {
  it.each([
    ['America/New_York', Date.UTC(2026, 2, 8, 17), 23],
    ['America/New_York', Date.UTC(2026, 10, 1, 17), 25],
    ['America/Phoenix', Date.UTC(2026, 2, 8, 19), 24],
    ['Australia/Sydney', Date.UTC(2026, 3, 5, 2), 25],
    ['Australia/Sydney', Date.UTC(2026, 9, 4, 2), 23],
  ])('cut a day in %s at %i into %i hours', (zone, noon, hours) => {
    const day = dayOf(zone, noon);

    expect(listLocalSlices(zone, day.from, day.to, 60)).toHaveLength(hours);
  });

  it('leave out the skipped hour and double the doubled one', () => {
    const hours = (noon: number) => {
      const day = dayOf('America/New_York', noon);
      return listLocalSlices('America/New_York', day.from, day.to, 60).map(({ hour }) => hour);
    };

    expect(hours(Date.UTC(2026, 2, 8, 17)).slice(0, 4)).toEqual([0, 1, 3, 4]);
    expect(hours(Date.UTC(2026, 10, 1, 17)).slice(0, 4)).toEqual([0, 1, 1, 2]);
  });

  it('cut at the wall’s hours where the zone is half an hour off, and where clocks shift by half an hour', () => {
    const india = listLocalSlices('Asia/Kolkata', 0, 3 * HOUR, 60);
    expect(india.map(({ from }) => from / 60_000)).toEqual([0, 30, 90, 150]);

    const day = dayOf('Australia/Lord_Howe', Date.UTC(2026, 3, 5, 2));
    const slices = listLocalSlices('Australia/Lord_Howe', day.from, day.to, 60);
    expect((day.to - day.from) / HOUR).toBe(24.5);
    expect(slices.reduce((sum, { from, to }) => sum + to - from, 0)).toBe(day.to - day.from);
  });

  it('follow one another without a gap', () => {
    const start = Date.UTC(2026, 2, 7);
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 3 * 24 * HOUR }),
        fc.integer({ min: 1, max: 2 * 24 * HOUR }),
        fc.constantFrom(15 as const, 30 as const, 60 as const),
        (offset, length, minutes) => {
          const slices = listLocalSlices('America/New_York', start + offset, start + offset + length, minutes);
          expect(slices[0]?.from).toBe(start + offset);
          expect(slices.at(-1)?.to).toBe(start + offset + length);
          for (const [index, slice] of slices.entries()) {
            expect(slice.to - slice.from).toBeLessThanOrEqual(minutes * 60_000);
            if (index > 0) expect(slice.from).toBe(slices[index - 1]?.to);
          }
        },
      ),
    );
  });
});

describe('usage by hour', () => {
  const start = Date.UTC(2026, 6, 1, 7);

  it('spreads a run’s energy and water evenly over its hours', () => {
    const usage = listHourUsage(
      [sampleRun(start + HOUR / 2, start + 2 * HOUR)],
      'America/Phoenix',
      start,
      start + 3 * HOUR,
    );

    expect(usage.ok && usage.value.map(({ wattHours }) => wattHours)).toEqual([100, 200, 0]);
    expect(usage.ok && usage.value.map(({ gallons }) => gallons)).toEqual([900, 1800, 0]);
    expect(usage.ok && usage.value.map(({ coveredMs }) => coveredMs / HOUR)).toEqual([0.5, 1, 0]);
  });

  it('fills nothing in for a gap', () => {
    const gap = sampleRun(start, start + HOUR, { source: 'no-data', coveredMs: 0, gallons: undefined, wattHours: 0 });
    const usage = listHourUsage([gap], 'America/Phoenix', start, start + HOUR);

    expect(usage.ok && usage.value[0]).toMatchObject({ wattHours: 0, coveredMs: 0, turningMs: 0 });
  });

  it('keeps every watt-hour, however the runs lie to the hours', () => {
    const lengths = fc.array(fc.integer({ min: 1, max: 5 * HOUR }), { minLength: 1, maxLength: 12 });
    fc.assert(
      fc.property(lengths, fc.integer({ min: 0, max: HOUR }), (steps, offset) => {
        let at = start + offset;
        const runs = steps.map((step) => {
          const run = sampleRun(at, at + step);
          at += step;
          return run;
        });
        const usage = listHourUsage(runs, 'America/Phoenix', start, at + HOUR);
        const total = runs.reduce((sum, run) => sum + run.wattHours, 0);
        if (!usage.ok) throw new Error('must be accepted');
        expect(usage.value.reduce((sum, hour) => sum + hour.wattHours, 0)).toBeCloseTo(total, 6);
      }),
    );
  });

  it.each([
    [
      'a meter that reads negative',
      [sampleRun(start, start + HOUR, { wattHours: -3 })],
      'runs[0].wattHours: too-small',
    ],
    [
      'watt-hours that are no number',
      [sampleRun(start, start + HOUR, { wattHours: Number.NaN })],
      'runs[0].wattHours: not-finite',
    ],
    [
      'a run that ends before it starts',
      [sampleRun(start + HOUR, start, { wattHours: 1 })],
      'runs[0].to: ends-before-it-starts',
    ],
  ])('refuses %s by name', (_, runs, fault) => {
    const usage = listHourUsage(runs, 'America/Phoenix', start, start + HOUR);

    expect(usage.ok ? [] : usage.refusals.map(({ field, reason }) => `${field}: ${reason}`)).toEqual([fault]);
  });

  it('says that a meter never reads negative', () => {
    const usage = listHourUsage(
      [sampleRun(start, start + HOUR, { wattHours: -3 })],
      'America/Phoenix',
      start,
      start + HOUR,
    );

    expect(usage.ok ? '' : usage.refusals[0]?.allowed).toContain('from 0');
  });

  it('refuses an unknown zone, and a stretch of no time', () => {
    expect(listHourUsage([], 'Mars/Olympus', 0, 1)).toMatchObject({
      refusals: [{ reason: 'unknown-zone', field: 'zone' }],
    });
    expect(listHourUsage([], 'America/Phoenix', 1, 1)).toMatchObject({ refusals: [{ reason: 'empty-stretch' }] });
    expect(listHourUsage([], 'America/Phoenix', 0, Number.POSITIVE_INFINITY)).toMatchObject({
      refusals: [{ reason: 'empty-stretch' }],
    });
  });
});
