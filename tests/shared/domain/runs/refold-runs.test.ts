import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createControl } from '#shared/domain/control/create-control.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { createRunFold } from '#shared/domain/runs/create-run-fold.ts';
import { refoldRuns } from '#shared/domain/runs/refold-runs.ts';
import { refoldStart } from '#shared/domain/runs/refold-start.ts';
import type { Run } from '#shared/domain/runs/run.ts';
import { inventedPump, reading, wall } from '../control/invented-pump.ts';
import { anyReadings, lastStates } from './invented-readings.ts';

const CONTEXT = inventedPump({ settings: { prime: { rpm: 3450, seconds: 60 } } });
const day = (text: string): number => wall(CONTEXT.zone, `2025-07-01 ${text}`);

function fold(given: readonly Reading[]): Run[] {
  const control = createControl(CONTEXT);
  const runs = createRunFold(CONTEXT);
  for (const next of given) runs.push(next, control.push(next));
  return lastStates(runs.take());
}

function steady(from: string, to: string, rpm: number): Reading[] {
  const readings: Reading[] = [];
  for (let at = day(from); at < day(to); at += 10_000) readings.push(reading(at, rpm));
  return readings;
}

describe('runs folded again', () => {
  it('lose the gap that late readings fill, and say which they are', () => {
    const before = steady('11:00', '12:00', 1700);
    const late = steady('12:00', '12:30', 1700);
    const after = steady('12:30', '13:00', 1700);
    const stored = fold([...before, ...after]);
    expect(stored.map((run) => run.source)).toEqual(['program', 'no-data', 'program']);
    const from = refoldStart(stored, day('12:00'));
    expect(from).toBe(day('11:00'));
    const again = refoldRuns(CONTEXT, [...before, ...late, ...after], { from, lateAt: late.map(({ at }) => at) });
    expect(again).toMatchObject([{ from, to: undefined, source: 'program', flags: ['late-corrected'] }]);
  });

  it('move the water that the stored runs tell of at their speed, with its sigma', () => {
    const before = steady('11:00', '12:00', 1700);
    const late = steady('12:00', '12:30', 1700);
    const stored = fold(before).map((run) => ({ ...run, gallons: 1800, gallonsSigma: 180 }));
    const stretch = { from: day('11:00'), lateAt: late.map(({ at }) => at), stored };
    const [told] = refoldRuns(CONTEXT, [...before, ...late], stretch);

    expect(told?.gallons).toBeCloseTo(1.5 * 1800, -1);
    expect(told?.gallonsSigma).toBeCloseTo(1.5 * 180, -1);
    expect(refoldRuns(CONTEXT, [...before, ...late], { ...stretch, stored: [] })[0]?.gallons).toBeUndefined();
  });

  it('end where a later stored run begins', () => {
    const readings = [
      ...steady('05:50', '06:00', 0),
      ...steady('06:00', '06:01', 3450),
      ...steady('06:01', '07:00', 1700),
    ];
    const stored = fold(readings);
    const [off, prime, program] = stored;
    const again = refoldRuns(CONTEXT, readings, { from: off?.from ?? 0, to: program?.from, lateAt: [] });
    expect(again).toEqual([off, prime]);
  });

  it('are the same as before where nothing came late, from wherever they may begin', () => {
    fc.assert(
      fc.property(anyReadings(day('05:30')), fc.nat(), (given, position) => {
        const stored = fold(given);
        const from = refoldStart(stored, given[position % given.length]?.at ?? 0);
        const begins = given.findIndex(({ at }) => at >= from);
        const control = createControl(CONTEXT);
        for (const next of given.slice(0, begins)) control.push(next);
        const controlStart: unknown = JSON.parse(JSON.stringify(control.save()));
        const again = refoldRuns(CONTEXT, given.slice(begins), { from, controlStart, lateAt: [] });
        expect(again).toEqual(stored.filter((run) => run.from >= from));
      }),
      { numRuns: 200 },
    );
  });

  it('are none without readings', () => {
    expect(refoldRuns(CONTEXT, [], { from: 0, lateAt: [] })).toEqual([]);
  });
});
