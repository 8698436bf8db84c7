import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Dial } from '#simulator/clocks/dial.ts';
import { planWeek, readWeekPlan, type WeekWindow } from '#simulator/clocks/week-plan.ts';

const MINUTE = 60_000;
const DAILY = Array.from({ length: 7 }, () => true);
/** Monday 5 January 1970, midnight UTC. */
const MONDAY = 4 * 86_400_000;
const dial = (driftMsPerDay = 0): Dial => ({
  offsetMs: 0,
  setAt: MONDAY,
  driftMsPerDay,
  knowsDaylightSaving: false,
  carryOverMs: 0,
  standsAtMs: undefined,
});

describe('readWeekPlan', () => {
  const plan = planWeek([{ days: DAILY, fromMinute: 480, toMinute: 720 }]);

  it('says what is on and until when', () => {
    expect(readWeekPlan(plan, dial(), MONDAY)).toEqual({ on: [], until: MONDAY + 480 * MINUTE });
    expect(readWeekPlan(plan, dial(), MONDAY + 480 * MINUTE)).toEqual({ on: [0], until: MONDAY + 720 * MINUTE });
    expect(readWeekPlan(plan, dial(), MONDAY + 720 * MINUTE)).toEqual({ on: [], until: MONDAY + 1920 * MINUTE });
  });

  it('passes midnight and the end of the week', () => {
    const night = planWeek([
      { days: [false, false, false, false, false, false, true], fromMinute: 1320, toMinute: 120 },
    ]);

    expect(readWeekPlan(night, dial(), MONDAY).on).toEqual([0]);
    expect(readWeekPlan(night, dial(), MONDAY + 120 * MINUTE).on).toEqual([]);
    expect(readWeekPlan(night, dial(), MONDAY + (6 * 1440 + 1320) * MINUTE).on).toEqual([0]);
  });

  it('lists overlapping windows in the order given', () => {
    const overlapping = planWeek([
      { days: DAILY, fromMinute: 600, toMinute: 900 },
      { days: DAILY, fromMinute: 480, toMinute: 720 },
    ]);

    expect(readWeekPlan(overlapping, dial(), MONDAY + 650 * MINUTE).on).toEqual([0, 1]);
  });

  it('never changes for a dial that stands', () => {
    const standing = { ...dial(), standsAtMs: MONDAY + 500 * MINUTE };

    expect(readWeekPlan(plan, standing, MONDAY)).toEqual({ on: [0], until: Number.POSITIVE_INFINITY });
  });

  it('comes earlier by a fast dial', () => {
    // Ten minutes a day fast: after a third of a day, more than three minutes.
    const { until } = readWeekPlan(plan, dial(10 * MINUTE), MONDAY);

    expect(until).toBeLessThan(MONDAY + 477 * MINUTE);
    expect(until).toBeGreaterThan(MONDAY + 475 * MINUTE);
  });

  it('is never on or off for a longer or shorter time than its windows say', () => {
    const window: fc.Arbitrary<WeekWindow> = fc
      .record({
        days: fc.array(fc.boolean(), { minLength: 7, maxLength: 7 }),
        fromMinute: fc.integer({ min: 0, max: 1439 }),
        toMinute: fc.integer({ min: 1, max: 1440 }),
      })
      .filter(({ fromMinute, toMinute }) => fromMinute !== toMinute);
    fc.assert(
      fc.property(fc.array(window, { maxLength: 4 }), fc.integer({ min: 0, max: 10_079 }), (windows, minute) => {
        const on = windows.flatMap(({ days, fromMinute, toMinute }, index) => {
          const length = toMinute > fromMinute ? toMinute - fromMinute : toMinute + 1440 - fromMinute;
          const covers = days.some(
            (flag, day) => flag && (minute - day * 1440 - fromMinute + 20_160) % 10_080 < length,
          );
          return covers ? [index] : [];
        });

        expect(readWeekPlan(planWeek(windows), dial(), MONDAY + minute * MINUTE).on).toEqual(on);
      }),
    );
  });
});
