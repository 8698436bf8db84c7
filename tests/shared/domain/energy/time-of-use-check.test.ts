import { describe, expect, it } from 'vitest';
import { DEFAULT_TRAITS, type MotorSettings } from '#shared/domain/control/motor-settings.ts';
import { planWeek } from '#shared/domain/energy/plan-week.ts';
import { checkTimeOfUse } from '#shared/domain/energy/time-of-use-check.ts';
import { TIME_OF_USE, TWO_TIER } from './sample-tariffs.ts';

const everyDay = [true, true, true, true, true, true, true];
const settings: MotorSettings = {
  inputs: [2850, null, null],
  program: [
    { days: everyDay, fromMinute: 6 * 60, toMinute: 12 * 60, rpm: 1700 },
    { days: everyDay, fromMinute: 15 * 60, toMinute: 18 * 60, rpm: 1700 },
  ],
  prime: null,
  timed: null,
  freeze: null,
  maxRpm: 3450,
  minRpm: 600,
};
const clock = { input: 1, window: { days: everyDay, onMinute: 17 * 60, offMinute: 20 * 60, opensEarlyMinutes: 0 } };
const watts = (rpm: number): number => (rpm === 2850 ? 1200 : rpm > 0 ? 300 : 8);

describe('time-of-use check', () => {
  const findings = checkTimeOfUse(TIME_OF_USE, planWeek(settings, DEFAULT_TRAITS, [clock]), watts);

  it('finds clock windows as well as program entries, worst first', () => {
    expect(findings.map(({ caller }) => caller)).toEqual([
      { kind: 'clock', input: 1 },
      { kind: 'program', entry: 1 },
    ]);
  });

  it('counts a clock’s dear minutes and what they cost over the cheapest hours (computed by hand)', () => {
    // 3 h on 5 weekdays at 1.2 kW: 0.36 over in June to September, 0.18 over in the other eight months.
    const [worst] = findings;

    expect(worst?.months).toHaveLength(12);
    expect(worst?.months[6]).toMatchObject({ month: 6, dearMinutesPerWeek: 900 });
    expect(worst?.months[6]?.extraMicrosPerWeek).toBeCloseTo(15 * 1.2 * 0.36e6, 3);
    expect(worst?.extraMicrosPerYear).toBeCloseTo(15 * 1.2 * (4 * 0.36e6 + 8 * 0.18e6) * (365.25 / 84), 0);
  });

  it('leaves out of a program entry what a closed input takes over', () => {
    // 16:00 to 17:00 on five weekdays; from 17:00 the clock runs the motor.
    expect(findings[1]?.months[0]?.dearMinutesPerWeek).toBe(300);
  });

  it('finds nothing where one price rules all hours, or where nothing is known of the watts', () => {
    const week = planWeek(settings, DEFAULT_TRAITS, [clock]);

    expect(checkTimeOfUse(TWO_TIER, week, watts)).toEqual([]);
    expect(checkTimeOfUse(TIME_OF_USE, week, () => undefined)).toEqual([]);
    expect(checkTimeOfUse(TIME_OF_USE, week, () => Number.NaN)).toEqual([]);
    expect(checkTimeOfUse(TIME_OF_USE, [], watts)).toEqual([]);
  });
});
