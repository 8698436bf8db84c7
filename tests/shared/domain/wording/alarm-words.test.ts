import { describe, expect, it } from 'vitest';
import { DETECTORS } from '#shared/domain/detectors/detector.ts';
import { ALARM_WORDING } from '#shared/domain/wording/alarm-wording.data.ts';
import { alarmTitle, alarmWords } from '#shared/domain/wording/alarm-words.ts';

describe('words of an alarm', () => {
  it.each(DETECTORS)('%s has a title without evidence, a meaning and something to look at', (detector) => {
    for (const cause of ['unknown', ...Object.keys(ALARM_WORDING[detector].causes)]) {
      const words = alarmWords(detector, cause, {});

      expect(words.title).not.toBe(detector);
      expect(words.title).not.toMatch(/[{}]/);
      expect(words.meaning).not.toMatch(/[{}]/);
      expect(words.look.length).toBeGreaterThan(0);
      expect(words.cautions.length).toBeGreaterThan(0);
    }
  });

  it('counts tries where the evidence has them', () => {
    expect(alarmTitle('failed-prime', 'air-leak', { tries: 3 })).toBe('Did not prime, 3 tries');
    expect(alarmTitle('failed-prime', 'air-leak', { tries: 1 })).toBe('Did not prime, 1 try');
    expect(alarmTitle('failed-prime', 'air-leak', {})).toBe('Did not prime');
  });

  it('prefers the words of a known cause', () => {
    expect(alarmTitle('wrong-speed', 'ignores-input', { input: 1 })).toBe('Input 1 closed, runs program speed');
    expect(alarmTitle('low-load', 'slow', { drop: 0.41 })).toBe('Flow down 41 %, dirty filter?');
  });

  it('says a clock’s error as hours and minutes', () => {
    expect(alarmTitle('clock-shift', 'unknown', { input: 2, minutes: 100, direction: 'slow' })).toBe(
      'Time clock 2 is 1 h 40 slow',
    );
  });

  it('says a temperature in both degrees, for whoever reads it', () => {
    expect(alarmTitle('freezing', 'unknown', { ambientCelsius: 0.5 })).toBe('33 °F (0.5 °C) and standing still');
    expect(alarmTitle('freezing', 'unknown', { ambientCelsius: -0.01 })).toBe('32 °F (0 °C) and standing still');
  });

  it('fits one line of the wall', () => {
    expect(alarmTitle('costly-program', 'hours-too-long', { saving: 0.42 })).toBe(
      'More water than asked for: 42 % to save',
    );
  });

  it('asks for lock-out before a lid is opened and before a wire is touched', () => {
    expect(alarmWords('failed-prime', 'air-leak', {}).cautions.join(' ')).toMatch(/Lock out/);
    expect(alarmWords('wrong-speed', 'ignores-input', {}).cautions.join(' ')).toMatch(/Test for no voltage/);
  });

  it('never names a number that the evidence does not hold', () => {
    expect(alarmTitle('supply-voltage', 'sag', { volts: Number.NaN })).toBe('The supply sags');
  });
});
