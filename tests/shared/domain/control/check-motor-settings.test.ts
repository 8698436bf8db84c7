import { describe, expect, it } from 'vitest';
import { checkMotorSettings } from '#shared/domain/control/check-motor-settings.ts';
import { DEFAULT_TRAITS, type MotorSettings } from '#shared/domain/control/motor-settings.ts';
import { EVERY_DAY, entry, SETTINGS } from './invented-pump.ts';

function faults(settings: Partial<MotorSettings>, inputCount = 3): string[] {
  const found = checkMotorSettings({ ...SETTINGS, ...settings }, { ...DEFAULT_TRAITS, inputCount });
  return found.map(({ field, reason }) => `${field} ${reason}`);
}

describe('motor settings', () => {
  it('are accepted as commissioned, and with everything that need not be used switched off', () => {
    expect(faults({})).toEqual([]);
    expect(faults({ inputs: [null, null, null, null], program: [], prime: null, timed: null, freeze: null })).toEqual(
      [],
    );
  });

  it('are refused for an input beyond the model’s, by its name', () => {
    expect(faults({ inputs: [2850, 2400, null, 1800] })).toEqual(['inputs[3] input-beyond-model']);
    expect(checkMotorSettings({ ...SETTINGS, inputs: [2850, 2400, null, 1800] }, DEFAULT_TRAITS)[0]?.allowed).toBe(
      'no speed: the model has inputs 1 to 3',
    );
    expect(faults({ inputs: [2850] }, 0)).toEqual(['inputs[0] input-beyond-model']);
  });

  it('are refused for a program entry without length, without seven days, or out of the day', () => {
    expect(faults({ program: [entry('06:00', '06:00', 1700)] })).toEqual(['program[0].toMinute no-length']);
    expect(faults({ program: [entry('06:00', '07:00', 1700, [true])] })).toEqual(['program[0].days not-seven-days']);
    const outside = { days: EVERY_DAY, fromMinute: 1440, toMinute: 1441, rpm: 1700 };
    expect(faults({ program: [entry('00:00', '24:00', 1700), outside] })).toEqual([
      'program[1].fromMinute too-large',
      'program[1].toMinute too-large',
    ]);
  });

  it('are refused for a speed outside the motor’s own limits, all at once', () => {
    const settings = {
      inputs: [3500, Number.NaN, null],
      program: [entry('06:00', '07:00', 500)],
      prime: { rpm: 3451, seconds: 0 },
      timed: { rpm: 599, minutes: 1441 },
      freeze: { celsius: Number.NaN, rpm: 599 },
    };
    expect(faults(settings)).toEqual([
      'inputs[0] too-large',
      'inputs[1] not-finite',
      'program[0].rpm too-small',
      'prime.rpm too-large',
      'prime.seconds too-small',
      'timed.rpm too-small',
      'timed.minutes too-large',
      'freeze.rpm too-small',
      'freeze.celsius not-finite',
    ]);
  });

  it('are refused for limits that are none, without blaming the speeds for it', () => {
    expect(faults({ minRpm: 3450, maxRpm: 600 })).toEqual(['minRpm least-over-most']);
    expect(faults({ maxRpm: Number.NaN })).toEqual(['maxRpm not-finite']);
    expect(faults({ maxRpm: Number.NaN, inputs: [5000] })).toEqual(['maxRpm not-finite', 'inputs[0] too-large']);
  });
});
