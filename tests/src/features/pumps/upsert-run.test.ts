import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { alignWindow } from '#src/features/pumps/align-window.ts';
import { upsertRun } from '#src/features/pumps/upsert-run.ts';
import { makeRun } from '#tests/src/support/make-run.ts';

const spans = (runs: ReturnType<typeof upsertRun>) => runs.map(({ from, to }) => [from, to]);

describe('a run in its latest state', () => {
  it('takes the place of itself', () => {
    const runs = [makeRun({ from: 0, to: 10 }), makeRun({ from: 10, to: null, meanRpm: 1 })];
    expect(upsertRun(runs, makeRun({ from: 10, to: 20, meanRpm: 2 }))[1]).toMatchObject({ to: 20, meanRpm: 2 });
  });

  it('ends the open run before it', () => {
    expect(spans(upsertRun([makeRun({ from: 0, to: null })], makeRun({ from: 30, to: null })))).toEqual([
      [0, 30],
      [30, null],
    ]);
  });

  it('replaces the runs that late readings have corrected away', () => {
    const runs = [makeRun({ from: 0, to: 10 }), makeRun({ from: 10, to: 20 }), makeRun({ from: 20, to: 30 })];
    expect(spans(upsertRun(runs, makeRun({ from: 5, to: 30 })))).toEqual([
      [0, 10],
      [5, 30],
    ]);
  });

  it('finds its place in time whatever the order of arrival', () => {
    fc.assert(
      fc.property(fc.shuffledSubarray([0, 10, 20, 30, 40], { minLength: 5 }), (order) => {
        const runs = order.reduce<ReturnType<typeof upsertRun>>(
          (list, from) => upsertRun(list, makeRun({ from, to: from + 10 })),
          [],
        );
        expect(runs.map(({ from }) => from)).toEqual([0, 10, 20, 30, 40]);
      }),
    );
  });
});

it('asks for whole quarters of a day, so that a moving wall asks seldom', () => {
  const hour = 3_600_000;
  expect(alignWindow({ from: hour, until: 7 * hour })).toEqual({ from: 0, until: 12 * hour });
  expect(alignWindow({ from: 0, until: 6 * hour })).toEqual({ from: 0, until: 6 * hour });
});
