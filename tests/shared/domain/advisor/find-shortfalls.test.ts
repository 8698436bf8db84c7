import { describe, expect, it } from 'vitest';
import { findShortfalls } from '#shared/domain/advisor/find-shortfalls.ts';
import type { PadNeeds } from '#shared/domain/advisor/pad-needs.ts';
import { speedsOfWeek, visitMinutes, WEEK_MINUTES, type WeekMinutes } from '#shared/domain/advisor/week-minutes.ts';
import { ORDINARY_WEEK } from '#shared/domain/energy/plan-week.ts';
import { EVERY_DAY, WEEKEND } from './sample-request.ts';

const HOUR = 3_600_000;
const speedAt = (rpm: number) => ({ rpm, gpm: rpm / 50, watts: rpm / 10 });
const none = new Float64Array(WEEK_MINUTES);
/** 1500 rpm (30 gpm) from 8 to 18 h every day. */
const week = speedsOfWeek(
  EVERY_DAY.map((_, day) => ({
    from: ORDINARY_WEEK.from + (day * 24 + 8) * HOUR,
    to: ORDINARY_WEEK.from + (day * 24 + 18) * HOUR,
    rpm: 1500,
  })),
);
const needs = (change: Partial<PadNeeds>): PadNeeds => ({ gallonsPerDay: 0, windows: [], quiet: [], ...change });
const shortfalls = (change: Partial<PadNeeds>, inputs: WeekMinutes = none) =>
  findShortfalls(week, inputs, needs(change), speedAt);

describe('shortfalls of a week', () => {
  it('are none where every need is met', () => {
    const windows = [{ kind: 'booster' as const, days: EVERY_DAY, fromMinute: 510, toMinute: 1050, minimumRpm: 1500 }];

    expect(shortfalls({ gallonsPerDay: 18_000, windows, hours: { kind: 'cell', minimumGpm: 30, hours: 10 } })).toEqual(
      [],
    );
  });

  it('name missing water and missing hours of flow', () => {
    expect(shortfalls({ gallonsPerDay: 20_000, hours: { kind: 'cell', minimumGpm: 30, hours: 11 } })).toEqual([
      { need: 'daily-volume', weekdays: [0, 1, 2, 3, 4, 5, 6], short: 2000 },
      { need: 'flow-hours', weekdays: [0, 1, 2, 3, 4, 5, 6], short: 60 },
    ]);
  });

  it('name a booster that lacks its half hour on each side', () => {
    const windows = [{ kind: 'booster' as const, days: WEEKEND, fromMinute: 480, toMinute: 600, minimumRpm: 1500 }];

    expect(shortfalls({ windows })).toEqual([{ need: 'booster', weekdays: [5, 6], short: 30 }]);
  });

  it('name noise in quiet hours, but not that of an input', () => {
    const quiet = [{ days: EVERY_DAY, fromMinute: 1020, toMinute: 480, maximumRpm: 1000 }];

    expect(shortfalls({ quiet })).toEqual([{ need: 'quiet-hours', weekdays: [0, 1, 2, 3, 4, 5, 6], short: 60 }]);
    expect(shortfalls({ quiet }, week)).toEqual([]);
  });
});

describe('minutes of a week', () => {
  it('lead from Sunday night into Monday', () => {
    const minutes: number[] = [];
    const sunday = [false, false, false, false, false, false, true];
    visitMinutes({ days: sunday, fromMinute: 1439, toMinute: 1 }, 0, (minute) => minutes.push(minute));

    expect(minutes).toEqual([WEEK_MINUTES - 1, 0]);
  });

  it('take the run that holds their middle', () => {
    const speeds = speedsOfWeek([{ from: ORDINARY_WEEK.from + 20_000, to: ORDINARY_WEEK.from + 100_000, rpm: 900 }]);

    expect([...speeds.subarray(0, 3)]).toEqual([900, 900, 0]);
  });
});
