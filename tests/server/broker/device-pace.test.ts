import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createDevicePace } from '#server/broker/device-pace.ts';

const LIMITS = { messagesPerSecond: 20, burst: 200, longestWaitMs: 30_000 };

describe("a device's pace", () => {
  it('takes a burst of 200 at once and slows the next', () => {
    const pace = createDevicePace(LIMITS, 0);
    for (let message = 0; message < 200; message += 1) expect(pace(0)).toEqual({ waitMs: 0 });
    expect(pace(0)).toEqual({ waitMs: 50 });
    expect(pace(0)).toEqual({ waitMs: 100 });
  });

  it('refuses what would wait longer than the longest wait', () => {
    const pace = createDevicePace(LIMITS, 0);
    for (let message = 0; message < 200 + 600; message += 1) expect(pace(0)).not.toBe('refused');
    expect(pace(0)).toBe('refused');
  });

  it('gives the whole burst back after ten quiet seconds', () => {
    const pace = createDevicePace(LIMITS, 0);
    for (let message = 0; message < 200; message += 1) pace(0);
    for (let message = 0; message < 200; message += 1) expect(pace(10_000)).toEqual({ waitMs: 0 });
  });

  it('never lets a message overtake one before it, and never exceeds its rate', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 0, max: 200 }), { minLength: 1, maxLength: 600 }), (gaps) => {
        const pace = createDevicePace(LIMITS, 0);
        let now = 0;
        const turns: number[] = [];
        for (const gap of gaps) {
          now += gap;
          const answer = pace(now);
          if (answer !== 'refused') turns.push(now + answer.waitMs);
        }
        expect(turns).toEqual(turns.toSorted((a, b) => a - b));
        for (const [index, turn] of turns.entries()) {
          const allowed = LIMITS.burst + (turn / 1000) * LIMITS.messagesPerSecond;
          expect(index + 1).toBeLessThanOrEqual(Math.ceil(allowed) + 1);
        }
      }),
    );
  });
});
