import { describe, expect, it } from 'vitest';
import { coverageOf } from '#shared/domain/energy/coverage.ts';
import { sampleRun } from '#tests/shared/domain/turnover/sample-runs.ts';

describe('coverage', () => {
  it('names every gap: without data, and without a run', () => {
    const runs = [sampleRun(0, 40), sampleRun(40, 50, { source: 'no-data' }), sampleRun(60, 90)];

    expect(coverageOf(runs, 10, 110)).toEqual({
      coveredMs: 60,
      share: 0.6,
      gaps: [
        { from: 40, to: 60 },
        { from: 90, to: 110 },
      ],
    });
  });

  it('counts an open run to the end, an overlap once, and order not at all', () => {
    expect(coverageOf([{ ...sampleRun(50, 60), to: undefined }, sampleRun(0, 60)], 0, 100)).toEqual({
      coveredMs: 100,
      share: 1,
      gaps: [],
    });
  });

  it('is none in no time, or in endless time', () => {
    expect(coverageOf([sampleRun(0, 10)], 5, 5)).toEqual({ coveredMs: 0, share: 0, gaps: [] });
    expect(coverageOf([sampleRun(0, 10)], 0, Number.POSITIVE_INFINITY).share).toBe(0);
    expect(coverageOf([], 0, 10)).toEqual({ coveredMs: 0, share: 0, gaps: [{ from: 0, to: 10 }] });
  });
});
