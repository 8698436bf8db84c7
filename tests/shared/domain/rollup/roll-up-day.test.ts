import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createControl } from '#shared/domain/control/create-control.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { type DayRollup, rollUpDay } from '#shared/domain/rollup/roll-up-day.ts';
import { RUN_SOURCES } from '#shared/domain/rollup/slice-sums.ts';
import { createRunFold } from '#shared/domain/runs/create-run-fold.ts';
import type { Run } from '#shared/domain/runs/run.ts';
import { localDayAt, localDays } from '#shared/domain/time/local-days.ts';
import { inventedPump, wall } from '../control/invented-pump.ts';
import { anyReadings } from '../runs/invented-readings.ts';

const CONTEXT = inventedPump({ zone: 'America/New_York', settings: { prime: { rpm: 3450, seconds: 60 } } });
const { zone } = CONTEXT;
const HOUR_MS = 3_600_000;

/** The runs of readings, the last one still open. */
function runsOf(readings: readonly Reading[]): Run[] {
  const control = createControl(CONTEXT);
  const fold = createRunFold(CONTEXT);
  const flowOf = ({ rpm, at }: Reading) => ((at / 1000) % 7 === 0 ? undefined : { gpm: rpm / 50, sigmaShare: 0.08 });
  for (const reading of readings) fold.push(reading, control.push(reading), flowOf(reading));
  return fold.take();
}

function rollUp(readings: readonly Reading[], runs = runsOf(readings)): DayRollup[] {
  const [first, last] = [readings[0]?.at ?? 0, readings.at(-1)?.at ?? 0];
  return localDays(zone, first, last + 1).map((day) => rollUpDay(zone, day, readings, runs, last));
}

/**
 * Something that changes with the very last reading before a gap makes a run of no length, which nobody keeps: the fold
 * held the value before it, the rollup draws the trapezoid. How much that can be, Wh.
 */
function untold(readings: readonly Reading[], runs: readonly Run[]): number {
  const gaps = new Set(runs.filter(({ source }) => source === 'no-data').map(({ from }) => from));
  return sum(
    readings.map(({ at, watts }, index) => {
      const before = readings[index - 1];
      if (before === undefined || (!gaps.has(at) && index < readings.length - 1)) return 0;
      return (Math.abs(watts - before.watts) * (at - before.at)) / 2 / HOUR_MS;
    }),
  );
}

const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0);
const wattHours = (days: readonly DayRollup[]) => sum(days.map(({ whole }) => whole.wattMs)) / HOUR_MS;

/** A night with both kinds of day, and an ordinary one. */
const STARTS = ['2025-07-01 21:30', '2025-03-08 23:00', '2025-11-01 23:00'].map((text) => wall(zone, text));
const anyNight = fc.constantFrom(...STARTS).chain((from) => anyReadings(from));

describe('a day rolled up', () => {
  it('has the energy, the time and the water of its runs, whatever they are', () => {
    fc.assert(
      fc.property(anyNight, (readings) => {
        const runs = runsOf(readings);
        const days = rollUp(readings, runs);
        const difference = Math.abs(wattHours(days) - sum(runs.map((run) => run.wattHours)));
        expect(difference).toBeLessThan(1e-5 + untold(readings, runs));
        expect(sum(days.map(({ whole }) => whole.coveredMs))).toBeCloseTo(sum(runs.map((run) => run.coveredMs)), 3);
        expect(sum(days.map(({ whole }) => whole.gallons))).toBeCloseTo(sum(runs.map((run) => run.gallons ?? 0)), 5);
      }),
      { numRuns: 200 },
    );
  });

  it('tells time by source as the runs do, and knows a gap from time to come', () => {
    fc.assert(
      fc.property(anyNight, (readings) => {
        const runs = runsOf(readings);
        const end = readings.at(-1)?.at ?? 0;
        const days = rollUp(readings, runs);
        for (const [index, source] of RUN_SOURCES.entries()) {
          if (source === 'no-data') continue;
          const own = runs.filter((run) => run.source === source).map((run) => (run.to ?? end) - run.from);
          expect([source, sum(days.map(({ whole }) => whole.sourceMs[index] ?? 0))]).toEqual([source, sum(own)]);
        }
        const told = sum(days.map(({ whole }) => sum(whole.sourceMs)));
        expect(told).toBe(end - (days[0]?.day.from ?? 0));
      }),
    );
  });

  it('is the sum of its hours and of its steps, which follow one another from midnight to midnight', () => {
    fc.assert(
      fc.property(anyNight, (readings) => {
        for (const { day, hours, fives, whole } of rollUp(readings)) {
          for (const parts of [hours, fives]) {
            expect(parts[0]?.from).toBe(day.from);
            expect(parts.at(-1)?.to).toBe(day.to);
            for (const [index, part] of parts.entries()) expect(part.from).toBe(parts[index - 1]?.to ?? day.from);
            expect(sum(parts.map(({ wattMs }) => wattMs))).toBeCloseTo(whole.wattMs, 3);
            expect(sum(parts.map(({ readings: count }) => count))).toBe(whole.readings);
          }
        }
      }),
    );
  });

  it('has extremes within those of the readings, and means between the extremes', () => {
    fc.assert(
      fc.property(anyNight, (readings) => {
        for (const { whole } of rollUp(readings)) {
          if (whole.coveredMs === 0) expect(whole.rpmMax).toBeUndefined();
          else {
            expect(whole.rpmMax).toBeLessThanOrEqual(Math.max(...readings.map(({ rpm }) => rpm)));
            expect(whole.wattsMin).toBeGreaterThanOrEqual(Math.min(...readings.map(({ watts }) => watts)));
            expect(whole.wattMs / whole.coveredMs).toBeLessThanOrEqual((whole.wattsMax ?? 0) + 1e-6);
          }
        }
      }),
    );
  });
});

/** A reading a minute at steady watts over a local day. */
function steadyDay(date: string, watts: number): { day: DayRollup; hours: number } {
  const from = wall(zone, `${date} 00:00`);
  const day = localDayAt(zone, from);
  if (day === undefined) throw new Error('an unknown zone');
  const readings: Reading[] = [];
  for (let at = day.from - 60_000; at <= day.to + 60_000; at += 60_000)
    readings.push({ at, rpm: 1700, watts, closedInputs: 0, activeInput: 0 });
  const minutely = inventedPump({ zone, settings: { prime: null } });
  const control = createControl({ ...minutely, intervalSeconds: 60 });
  const fold = createRunFold({ ...minutely, intervalSeconds: 60 });
  for (const reading of readings) fold.push(reading, control.push(reading));
  const rollup = rollUpDay(zone, day, readings, fold.take(), day.to + 60_000);
  return { day: rollup, hours: (day.to - day.from) / HOUR_MS };
}

describe('days of other lengths', () => {
  it('has 23 hours in spring and 25 in autumn, each with its energy', () => {
    for (const [date, hours] of [
      ['2025-03-09', 23],
      ['2025-07-01', 24],
      ['2025-11-02', 25],
    ] as const) {
      const { day } = steadyDay(date, 600);
      expect(day.hours).toHaveLength(hours);
      expect(day.fives).toHaveLength(hours * 12);
      expect(day.whole.wattMs / HOUR_MS).toBeCloseTo(600 * hours, 6);
      expect(day.whole.coveredMs).toBe(hours * HOUR_MS);
    }
  });

  it('skips the hour of the shift in spring and has it twice in autumn', () => {
    expect(
      steadyDay('2025-03-09', 600)
        .day.hours.map(({ hour }) => hour)
        .slice(0, 4),
    ).toEqual([0, 1, 3, 4]);
    expect(
      steadyDay('2025-11-02', 600)
        .day.hours.map(({ hour }) => hour)
        .slice(0, 4),
    ).toEqual([0, 1, 1, 2]);
  });

  it('knows the largest quarter of each hour', () => {
    const { day } = steadyDay('2025-07-01', 600);
    expect(day.hours[9]?.quarterWattHours).toBeCloseTo(150, 9);
  });
});
