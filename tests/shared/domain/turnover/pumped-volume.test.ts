import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findTurnoverCompletion } from '#shared/domain/turnover/find-turnover-completion.ts';
import { listDayTurnovers } from '#shared/domain/turnover/list-day-turnovers.ts';
import { sumPumpedVolume } from '#shared/domain/turnover/pumped-volume.ts';
import { sampleRun } from './sample-runs.ts';

const HOUR = 3_600_000;

describe('pumped volume', () => {
  const runs = [
    sampleRun(0, 10 * HOUR),
    sampleRun(10 * HOUR, 12 * HOUR, { source: 'no-data', coveredMs: 0, gallons: undefined, wattHours: 0 }),
    sampleRun(12 * HOUR, 14 * HOUR, { gallons: undefined }),
    sampleRun(14 * HOUR, 24 * HOUR, { source: 'off', meanRpm: 0, gallons: undefined }),
  ];

  it('adds known water, and names the time whose water nobody knows', () => {
    expect(sumPumpedVolume(runs, 0, 24 * HOUR)).toEqual({
      gallons: 18_000,
      turningMs: 12 * HOUR,
      unknownMs: 2 * HOUR,
      coveredMs: 22 * HOUR,
    });
  });

  it('takes the part of a run that lies inside', () => {
    expect(sumPumpedVolume(runs, 9 * HOUR, 11 * HOUR)).toMatchObject({ gallons: 1800, coveredMs: HOUR });
  });

  it.each([Number.NaN, Number.POSITIVE_INFINITY, -5])('counts a run of %s gallons as unknown', (gallons) => {
    expect(sumPumpedVolume([sampleRun(0, HOUR, { gallons })], 0, HOUR)).toMatchObject({ gallons: 0, unknownMs: HOUR });
  });

  it('is nothing in no time', () => {
    expect(sumPumpedVolume(runs, 5, 5)).toEqual({ gallons: 0, turningMs: 0, unknownMs: 0, coveredMs: 0 });
    expect(sumPumpedVolume(runs, Number.NaN, 5).gallons).toBe(0);
  });

  it('is the sum of its parts wherever the stretch is cut', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 24 * HOUR - 1 }), (cut) => {
        const [whole, before, after] = [
          sumPumpedVolume(runs, 0, 24 * HOUR),
          sumPumpedVolume(runs, 0, cut),
          sumPumpedVolume(runs, cut, 24 * HOUR),
        ];
        expect(before.gallons + after.gallons).toBeCloseTo(whole.gallons, 6);
        expect(before.coveredMs + after.coveredMs).toBe(whole.coveredMs);
      }),
    );
  });
});

describe('turnovers by local day', () => {
  it('counts each day in its own zone: 23 hours where clocks go forward, 25 where they go back', () => {
    // 2026: 8 March and 1 November in the United States.
    for (const [month, day, hours] of [
      [2, 8, 23],
      [10, 1, 25],
    ] as const) {
      const noon = Date.UTC(2026, month, day, 17);
      const runs = [sampleRun(noon - 48 * HOUR, noon + 48 * HOUR)];
      const [only] = listDayTurnovers(runs, 'America/New_York', noon, noon + 1, 1800 * hours);

      expect(only?.turnovers).toBeCloseTo(1, 9);
      expect(only?.coverageShare).toBeCloseTo(1, 9);
    }
  });

  it('has no turnovers without a pool, and no days in an unknown zone', () => {
    expect(listDayTurnovers([], 'America/Phoenix', 0, 1, undefined)[0]?.turnovers).toBeUndefined();
    expect(listDayTurnovers([], 'Mars/Olympus', 0, 1, 1000)).toEqual([]);
  });
});

describe('completion of a turnover', () => {
  const runs = [sampleRun(0, 5 * HOUR), sampleRun(6 * HOUR, 20 * HOUR)];

  it('is the instant at which the water reaches the pool’s volume', () => {
    expect(findTurnoverCompletion(runs, 0, 24 * HOUR, 18_000)).toEqual({ kind: 'completed', at: 11 * HOUR });
    expect(findTurnoverCompletion(runs, HOUR, 24 * HOUR, 18_000)).toEqual({ kind: 'completed', at: 12 * HOUR });
    expect(findTurnoverCompletion(runs, 0, 24 * HOUR, 9000, 2)).toEqual({ kind: 'completed', at: 11 * HOUR });
  });

  it('says what is missing when it is not reached', () => {
    expect(findTurnoverCompletion(runs, 0, 10 * HOUR, 18_000)).toEqual({ kind: 'not-yet', missingGallons: 1800 });
    expect(findTurnoverCompletion([], 0, HOUR, 10)).toEqual({ kind: 'not-yet', missingGallons: 10 });
  });

  it.each([0, -1, Number.NaN, Number.POSITIVE_INFINITY])('refuses a pool of %s gallons by name', (gallons) => {
    expect(findTurnoverCompletion(runs, 0, HOUR, gallons)).toMatchObject({ kind: 'refused', field: 'poolGallons' });
    expect(findTurnoverCompletion(runs, 0, HOUR, 1000, gallons)).toMatchObject({ kind: 'refused', field: 'count' });
  });
});
