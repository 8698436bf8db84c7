import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createControl } from '#shared/domain/control/create-control.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { createRunFold } from '#shared/domain/runs/create-run-fold.ts';
import type { Run } from '#shared/domain/runs/run.ts';
import { inventedPump, wall } from '../control/invented-pump.ts';
import { anyReadings, lastStates } from './invented-readings.ts';

const CONTEXT = inventedPump({ settings: { prime: { rpm: 3450, seconds: 60 } } });
const START = wall(CONTEXT.zone, '2025-07-01 05:30');
const GAP_MS = 30_000;
const readings = anyReadings(START);

/** Folds readings, taking the runs (and, with `save`, going on from JSON) after the readings at the given positions. */
function fold(given: readonly Reading[], cuts: ReadonlySet<number>, save: boolean): Run[] {
  let control = createControl(CONTEXT);
  let runs = createRunFold(CONTEXT);
  const taken: Run[] = [];
  given.forEach((reading, index) => {
    runs.push(reading, control.push(reading), { gpm: reading.rpm / 50, sigmaShare: 0.1 });
    if (!cuts.has(index)) return;
    taken.push(...runs.take());
    if (!save) return;
    control = createControl(CONTEXT, JSON.parse(JSON.stringify(control.save())));
    runs = createRunFold(CONTEXT, JSON.parse(JSON.stringify(runs.save())));
  });
  taken.push(...runs.take());
  return lastStates(taken);
}

/** The runs, all closed at the last reading, and every instant at which a run began, were it only to be cut short. */
function closedRuns(given: readonly Reading[]): { runs: Run[]; begins: ReadonlySet<number> } {
  const control = createControl(CONTEXT);
  const fold = createRunFold(CONTEXT);
  const begins = new Set<number>();
  for (const reading of given) {
    fold.push(reading, control.push(reading), { gpm: reading.rpm / 50, sigmaShare: 0.1 });
    begins.add(fold.current()?.from ?? START);
  }
  fold.close(given.at(-1)?.at ?? START);
  return { runs: fold.take(), begins };
}

/** Watt-hours of the readings: the trapezoid, held where another run begins, nothing over a gap. */
function wattHoursOf(given: readonly Reading[], begins: ReadonlySet<number>): number {
  let wattMs = 0;
  for (const [index, reading] of given.entries()) {
    const before = given[index - 1];
    if (before === undefined || reading.at - before.at > GAP_MS) continue;
    const watts = begins.has(reading.at) ? before.watts : (before.watts + reading.watts) / 2;
    wattMs += watts * (reading.at - before.at);
  }
  return wattMs / 3_600_000;
}

describe('the run fold', () => {
  it('gives the same runs however they are taken', () => {
    fc.assert(
      fc.property(readings, fc.array(fc.nat(400)), (given, cuts) => {
        expect(fold(given, new Set(cuts), false)).toEqual(fold(given, new Set(), false));
      }),
      { numRuns: 200 },
    );
  });

  it('gives the same runs however often it is saved to JSON and goes on', () => {
    fc.assert(
      fc.property(readings, fc.array(fc.nat(400)), (given, cuts) => {
        expect(fold(given, new Set(cuts), true)).toEqual(fold(given, new Set(), false));
      }),
      { numRuns: 200 },
    );
  });

  it('conserves time: runs follow one another from the first reading to the last', () => {
    fc.assert(
      fc.property(readings, (given) => {
        const { runs } = closedRuns(given);
        let at = given[0]?.at;
        for (const run of runs) {
          expect(run.from).toBe(at);
          expect(run.to).toBeGreaterThan(run.from);
          at = run.to;
        }
        expect(at).toBe(given.at(-1)?.at);
      }),
      { numRuns: 200 },
    );
  });

  it('conserves energy: the runs’ energy is the readings’', () => {
    fc.assert(
      fc.property(readings, (given) => {
        const { runs, begins } = closedRuns(given);
        const sum = runs.reduce((total, run) => total + run.wattHours, 0);
        expect(sum).toBeCloseTo(wattHoursOf(given, begins), 6);
      }),
      { numRuns: 200 },
    );
  });

  it('covers all of the time but the gaps', () => {
    fc.assert(
      fc.property(readings, (given) => {
        for (const run of closedRuns(given).runs) {
          const length = (run.to ?? Number.NaN) - run.from;
          expect(run.coveredMs).toBe(run.source === 'no-data' ? 0 : length);
          if (run.source === 'no-data') expect(length).toBeGreaterThan(GAP_MS);
          else expect(run.wattHours).toBeCloseTo((run.meanWatts * length) / 3_600_000, 6);
        }
      }),
      { numRuns: 200 },
    );
  });

  it('never gives a figure that is no number, whatever it is fed', () => {
    const wild = fc.constantFrom(Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY);
    fc.assert(
      fc.property(
        readings,
        fc.nat(200),
        wild,
        fc.constantFrom('at', 'rpm', 'watts'),
        (given, position, value, field) => {
          const spoilt = given.toSpliced(position, 0, {
            ...(given[0] as Reading),
            at: (given[position]?.at ?? 0) - 1,
            [field]: value,
          });
          for (const run of closedRuns(spoilt).runs) {
            const figures = Object.values(run).filter((figure) => typeof figure === 'number');
            expect(figures.every(Number.isFinite)).toBe(true);
          }
        },
      ),
    );
  });
});
