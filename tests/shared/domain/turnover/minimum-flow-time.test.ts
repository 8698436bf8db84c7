import { describe, expect, it } from 'vitest';
import { SKIMMING_GPM, sumMinimumFlowTime } from '#shared/domain/turnover/minimum-flow-time.ts';
import { sampleRun } from './sample-runs.ts';

const HOUR = 3_600_000;

describe('minimum-flow time', () => {
  const heating = { closedInputs: 0b10 };
  const runs = [
    sampleRun(0, 2 * HOUR, heating),
    sampleRun(2 * HOUR, 3 * HOUR, { ...heating, gallons: 1200 }),
    sampleRun(3 * HOUR, 4 * HOUR, { ...heating, gallons: undefined }),
    sampleRun(4 * HOUR, 5 * HOUR, { ...heating, meanRpm: 0, gallons: undefined }),
    sampleRun(5 * HOUR, 6 * HOUR, { source: 'no-data', coveredMs: 0, gallons: undefined, closedInputs: 0b10 }),
    sampleRun(6 * HOUR, 8 * HOUR),
  ];

  it('parts the heater’s time into enough, short, and unknown', () => {
    expect(sumMinimumFlowTime(runs, { input: 2, minimumGpm: 30 }, 0, 8 * HOUR)).toEqual({
      dueMs: 5 * HOUR,
      enoughMs: 2 * HOUR,
      shortMs: 2 * HOUR,
      unknownMs: HOUR,
    });
  });

  it('takes equipment without an input as due whenever the pump turns', () => {
    expect(sumMinimumFlowTime(runs, { minimumGpm: SKIMMING_GPM }, 0, 8 * HOUR)).toEqual({
      dueMs: 6 * HOUR,
      enoughMs: 4 * HOUR,
      shortMs: HOUR,
      unknownMs: HOUR,
    });
  });

  it.each([undefined, 0, -1, Number.NaN])('asks nothing of a minimum of %s', (minimumGpm) => {
    expect(sumMinimumFlowTime(runs, { minimumGpm }, 0, 8 * HOUR)).toEqual({
      dueMs: 0,
      enoughMs: 0,
      shortMs: 0,
      unknownMs: 0,
    });
  });
});
