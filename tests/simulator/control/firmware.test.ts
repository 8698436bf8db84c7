import { describe, expect, it } from 'vitest';
import { createFirmware, nextFirmwareChange, runFirmware, type Sensed } from '#simulator/control/firmware.ts';
import { pressKey } from '#simulator/control/press-key.ts';
import { MOTOR_MODELS } from '#simulator/motor-models.data.ts';

const EVERY_DAY = Array.from({ length: 7 }, () => true);
const SETTINGS = {
  inputs: [2850, 2400, null, 2850],
  program: [
    { days: EVERY_DAY, fromMinute: 360, toMinute: 1200, rpm: 1700 },
    { days: EVERY_DAY, fromMinute: 600, toMinute: 700, rpm: 2000 },
  ],
  prime: { rpm: 3450, seconds: 60 },
  timed: { rpm: 3200, minutes: 45 },
  freeze: { celsius: 4.4, rpm: 1150 },
  maxRpm: 3450,
  minRpm: 600,
};
const plain = MOTOR_MODELS['Fernholt V3-165'];
const sensing = MOTOR_MODELS['Fernholt V4-270'];
const stubborn = MOTOR_MODELS['Fernholt V5-350'];

/** A motor to which things happen; `at` in seconds. */
function makeMotor(model = plain, settings: Parameters<typeof runFirmware>[1] = SETTINGS) {
  const firmware = createFirmware();
  const at = (seconds: number, sensed: Partial<Sensed> = {}) =>
    runFirmware(firmware, settings, model, {
      at: seconds * 1000,
      closed: 0,
      programOn: [],
      ambientCelsius: 20,
      loaded: true,
      ...sensed,
    });
  const press = (key: Parameters<typeof pressKey>[2], seconds: number) =>
    pressKey(firmware, settings, key, seconds * 1000);
  return { firmware, at, press };
}

describe('runFirmware', () => {
  it('primes on every start from standstill and names the input it obeys from the first moment', () => {
    const { at, firmware } = makeMotor();

    expect(at(0, { closed: 2 })).toEqual({ source: 'prime', rpm: 3450, activeInput: 2 });
    expect(nextFirmwareChange(firmware, 0)).toBe(60_000);
    expect(at(60, { closed: 2 })).toEqual({ source: 'input', rpm: 2400, activeInput: 2 });
  });

  it('does not prime again when one running source hands over to another', () => {
    const { at } = makeMotor();
    at(0, { closed: 1 });
    at(60, { closed: 1 });

    expect(at(100, { programOn: [0] })).toEqual({ source: 'program', rpm: 1700, activeInput: 0 });
  });

  it('starts a prime that was cut short again in full', () => {
    const { at, firmware } = makeMotor();
    at(0, { closed: 1 });
    at(30);
    at(40, { closed: 1 });

    expect(nextFirmwareChange(firmware, 40_000)).toBe(100_000);
  });

  it('does not prime when prime is off', () => {
    expect(makeMotor(plain, { ...SETTINGS, prime: null }).at(0, { closed: 1 }).source).toBe('input');
  });

  it('lets the fastest closed input win and an input that is not set never', () => {
    const { at } = makeMotor(plain, { ...SETTINGS, prime: null });

    expect(at(0, { closed: 0b0111 })).toMatchObject({ activeInput: 1, rpm: 2850 });
    expect(at(1, { closed: 0b0110 })).toMatchObject({ activeInput: 2, rpm: 2400 });
    expect(at(2, { closed: 0b0100 })).toMatchObject({ source: 'off', rpm: 0 });
    expect(at(3, { closed: 0b1001 })).toMatchObject({ activeInput: 1 });
  });

  it('takes overlapping entries of the program as its model does', () => {
    const off = { ...SETTINGS, prime: null };

    expect(makeMotor(plain, off).at(0, { programOn: [0, 1] }).rpm).toBe(1700);
    expect(makeMotor(sensing, off).at(0, { programOn: [0, 1] }).rpm).toBe(2000);
  });

  it('lets closed inputs beat keypad, timed run and program', () => {
    const motor = makeMotor(plain, { ...SETTINGS, prime: null });
    motor.press({ key: 'manual', rpm: 3000 }, 0);
    expect(motor.at(0, { programOn: [0] })).toMatchObject({ source: 'keypad', rpm: 3000 });
    expect(motor.at(1, { programOn: [0], closed: 2 })).toMatchObject({ source: 'input', rpm: 2400 });
    expect(motor.at(2, { programOn: [0] })).toMatchObject({ source: 'keypad' });
    motor.press({ key: 'resume' }, 3);

    expect(motor.at(3, { programOn: [0] })).toMatchObject({ source: 'program' });
  });

  it('ends a timed run by its minutes, and by an input unless the model goes on with it', () => {
    const off = { ...SETTINGS, prime: null };
    for (const [model, after] of [
      [plain, 'off'],
      [sensing, 'timed'],
    ] as const) {
      const motor = makeMotor(model, off);
      motor.press({ key: 'timed' }, 0);
      expect(motor.at(1)).toMatchObject({ source: 'timed', rpm: 3200 });
      motor.at(60, { closed: 1 });
      expect(motor.at(120).source).toBe(after);
      expect(motor.at(45 * 60).source).toBe('off');
    }
  });

  it('stops at the keypad, closed input or not, where the model says so', () => {
    for (const [model, source] of [
      [plain, 'stop'],
      [stubborn, 'input'],
    ] as const) {
      const motor = makeMotor(model, { ...SETTINGS, prime: null });
      motor.press({ key: 'stop' }, 0);
      expect(motor.at(0, { closed: 1 }).source).toBe(source);
      expect(motor.at(1, { programOn: [0] })).toEqual({ source: 'stop', rpm: 0, activeInput: 0 });
    }
  });

  it('guards against frost where nothing else runs, and looks again every hour', () => {
    const { at, firmware } = makeMotor(plain, { ...SETTINGS, prime: null });

    expect(at(0, { ambientCelsius: 4.4 })).toEqual({ source: 'freeze', rpm: 1150, activeInput: 0 });
    expect(nextFirmwareChange(firmware, 0)).toBe(3_600_000);
    expect(at(1800, { ambientCelsius: 9 }).source).toBe('freeze');
    expect(at(3600, { ambientCelsius: 9 }).source).toBe('off');
    expect(at(3700, { ambientCelsius: 4.3, programOn: [0] }).source).toBe('program');
  });

  it('obeys nothing while it has a fault', () => {
    const motor = makeMotor();
    motor.firmware.fault = { code: 'E07' };

    expect(motor.at(0, { closed: 1 })).toEqual({ source: 'fault', rpm: 0, activeInput: 0 });
  });

  it('runs on dry after the prime when it does not sense load', () => {
    const { at } = makeMotor(plain);
    at(0, { closed: 1, loaded: false });

    expect(at(60, { closed: 1, loaded: false })).toMatchObject({ source: 'input', rpm: 2850 });
  });

  it('tries again after a pause when it senses that it did not prime, and rests after the last try', () => {
    const { at, firmware } = makeMotor(sensing);
    const seen: string[] = [];
    for (let second = 0; second < 650; second += 5) {
      const command = at(second, { closed: 1, loaded: false });
      const word = `${command.source} ${command.rpm}`;
      if (seen.at(-1) !== word) seen.push(word);
    }

    expect(seen).toEqual([
      'prime 3450',
      'prime 0',
      'prime 3450',
      'prime 0',
      'prime 3450',
      'fault 0',
      'prime 3450',
      'prime 0',
      'prime 3450',
      'prime 0',
    ]);
    expect(firmware.tries).toBeGreaterThan(0);
  });
});
