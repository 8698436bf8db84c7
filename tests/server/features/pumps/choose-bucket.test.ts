import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { chooseBucketMs } from '#server/features/pumps/choose-bucket.ts';

const DAY_MS = 86_400_000;

describe("the length of a chart's point", () => {
  it('is one that people name', () => {
    expect(chooseBucketMs({ from: 0, until: DAY_MS }, 1000, 10_000)).toBe(120_000);
    expect(chooseBucketMs({ from: 0, until: 7 * DAY_MS }, 1000, 10_000)).toBe(900_000);
    expect(chooseBucketMs({ from: 0, until: 35 * DAY_MS }, 10, 10_000)).toBe(4 * DAY_MS);
  });

  it('is a day, or some of them, where a year is shown', () => {
    expect(chooseBucketMs({ from: 0, until: 60 * DAY_MS }, 1000, 10_000)).toBe(2 * 3_600_000);
    expect(chooseBucketMs({ from: 0, until: 365 * DAY_MS }, 1000, 10_000)).toBe(DAY_MS);
    expect(chooseBucketMs({ from: 0, until: 800 * DAY_MS }, 390, 10_000)).toBe(3 * DAY_MS);
  });

  it('is none where every reading has a point of its own', () => {
    expect(chooseBucketMs({ from: 0, until: 3_600_000 }, 1000, 10_000)).toBe(0);
  });

  it('never makes more points than asked for, plus one that is cut off', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 35 * DAY_MS }), fc.integer({ min: 10, max: 4000 }), (length, width) => {
        const bucketMs = chooseBucketMs({ from: 0, until: length }, width, 10_000);
        const points = bucketMs === 0 ? length / 10_000 : Math.ceil(length / bucketMs);
        expect(points).toBeLessThanOrEqual(width);
      }),
    );
  });
});
