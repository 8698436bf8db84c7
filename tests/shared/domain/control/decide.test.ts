import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decide } from '#shared/domain/control/decide.ts';
import { DEFAULT_TRAITS, type MotorSettings, type MotorTraits } from '#shared/domain/control/motor-settings.ts';
import type { Situation } from '#shared/domain/control/situation.ts';
import { SOURCES } from '#shared/domain/readings/reading.ts';
import { entry, SETTINGS, wall } from './invented-pump.ts';

const PHOENIX = 'America/Phoenix';
const NOON = wall(PHOENIX, '2025-07-01 12:00');
const NIGHT = wall(PHOENIX, '2025-07-01 23:00');

type Given = Partial<Situation> & { settings?: Partial<MotorSettings>; traits?: Partial<MotorTraits> };
function decided({ settings, traits, ...situation }: Given = {}) {
  const full: Situation = { at: NOON, zone: PHOENIX, motorClockOffsetMinutes: 0, closedInputs: 0, ...situation };
  return decide({ ...SETTINGS, ...settings }, { ...DEFAULT_TRAITS, ...traits }, full);
}

describe('which speed, and why', () => {
  it('is the program’s, until its end, and off until its next beginning', () => {
    expect(decided()).toEqual({
      source: 'program',
      rpm: 1700,
      lockedBy: undefined,
      until: wall(PHOENIX, '2025-07-01 20:00'),
      because: { kind: 'program', entry: 0, fromMinute: 360, toMinute: 1200 },
    });
    expect(decided({ at: NIGHT })).toMatchObject({ source: 'off', rpm: 0, until: wall(PHOENIX, '2025-07-02 06:00') });
    expect(decided({ settings: { program: [] } })).toMatchObject({ source: 'off', until: undefined });
  });

  it('runs on through an entry at the same speed: until the speed changes', () => {
    const program = [entry('06:00', '12:00', 1700), entry('12:00', '20:00', 1700)];
    expect(decided({ at: NOON - 1, settings: { program } }).until).toBe(wall(PHOENIX, '2025-07-01 20:00'));
    expect(decided({ settings: { program: [entry('00:00', '24:00', 1700)] } }).until).toBeUndefined();
  });

  it('is a closed input’s over program, keypad and timed run, and locks the keypad', () => {
    const claims = { keypadRpm: 1200, timedSince: NOON };
    expect(decided({ closedInputs: 0b01, ...claims })).toMatchObject({
      source: 'input',
      rpm: 2850,
      lockedBy: 1,
      until: undefined,
      because: { kind: 'input', input: 1, others: [] },
    });
    expect(decided({ closedInputs: 0b11 })).toMatchObject({ rpm: 2850, because: { input: 1, others: [2] } });
    expect(decided({ closedInputs: 0b10 })).toMatchObject({ rpm: 2400, lockedBy: 2 });
  });

  it('is never that of an input set to null or beyond the model', () => {
    expect(decided({ closedInputs: 0b100 }).source).toBe('program');
    const settings = { inputs: [2850, 2400, null, 3000] };
    expect(decided({ closedInputs: 0b1000, settings }).source).toBe('program');
    expect(decided({ closedInputs: 0b1000, settings, traits: { inputCount: 4 } }).rpm).toBe(3000);
  });

  it('is the keypad’s over the program, and a timed run’s for its minutes', () => {
    expect(decided({ keypadRpm: 1234 })).toMatchObject({ source: 'keypad', rpm: 1234, until: undefined });
    const since = NOON - 44 * 60_000;
    expect(decided({ timedSince: since })).toMatchObject({ source: 'timed', rpm: 3200, until: since + 45 * 60_000 });
    expect(decided({ timedSince: NOON - 45 * 60_000 }).source).toBe('program');
  });

  it('is freeze protection only where nothing else would run, checked again every hour', () => {
    expect(decided({ at: NIGHT, freezeSince: NIGHT })).toMatchObject({
      source: 'freeze',
      rpm: 1150,
      until: NIGHT + 3_600_000,
    });
    expect(decided({ freezeSince: NOON }).source).toBe('program');
    const late = wall(PHOENIX, '2025-07-02 05:30');
    expect(decided({ at: late, freezeSince: late }).until).toBe(wall(PHOENIX, '2025-07-02 06:00'));
    expect(decided({ at: NIGHT, freezeSince: NIGHT, settings: { freeze: null } }).source).toBe('off');
  });

  it('is a prime after a start from standstill, whoever asked for it, and not when nothing did', () => {
    const prime = { since: NOON - 60_000, claimed: false };
    const endsAt = NOON + 240_000;
    expect(decided({ prime })).toMatchObject({
      source: 'prime',
      rpm: 3450,
      until: endsAt,
      because: { kind: 'prime', endsAt, next: 'program' },
    });
    expect(decided({ prime, closedInputs: 0b10 })).toMatchObject({
      source: 'prime',
      lockedBy: 2,
      because: { next: 'input' },
    });
    expect(decided({ prime, keypadRpm: 1200 })).toMatchObject({ source: 'prime', because: { next: 'keypad' } });
    const atNight = { since: NIGHT - 60_000, claimed: false };
    expect(decided({ at: NIGHT, prime: atNight, freezeSince: NIGHT })).toMatchObject({
      source: 'prime',
      because: { next: 'freeze' },
    });
    expect(decided({ at: NIGHT, prime: atNight }).source).toBe('off');
  });

  it('holds the prime for its seconds, 30 more where the motor says so, and not at all where it is switched off', () => {
    const at = (seconds: number, claimed: boolean) =>
      decided({ prime: { since: NOON - seconds * 1000, claimed } }).source;
    expect([at(299, false), at(300, false), at(329, true), at(330, true)]).toEqual([
      'prime',
      'program',
      'prime',
      'program',
    ]);
    expect(decided({ prime: { since: NOON, claimed: true }, settings: { prime: null } }).source).toBe('program');
  });

  it('ends a prime with the program that asked for it', () => {
    const at = wall(PHOENIX, '2025-07-01 19:58');
    expect(decided({ at, prime: { since: at, claimed: false } }).until).toBe(wall(PHOENIX, '2025-07-01 20:00'));
  });

  it('is a keypad stop over a closed input, or under it where the model says so', () => {
    expect(decided({ stopped: true, closedInputs: 1 })).toMatchObject({ source: 'stop', rpm: 0, lockedBy: undefined });
    expect(decided({ stopped: true, closedInputs: 1, traits: { stopBeatsInputs: false } }).source).toBe('input');
    expect(decided({ stopped: true, closedInputs: 0b100, traits: { stopBeatsInputs: false } }).source).toBe('stop');
  });

  it('is a fault before anything else', () => {
    expect(decided({ fault: { code: 'E7' }, stopped: true, closedInputs: 1 })).toMatchObject({
      source: 'fault',
      rpm: 0,
      because: { kind: 'fault', code: 'E7' },
    });
  });

  it('hears the sources in the order of the model', () => {
    const keypadFirst: MotorTraits['precedence'] = [
      'fault',
      'stop',
      'prime',
      'keypad',
      'input',
      'timed',
      'program',
      'freeze',
      'off',
    ];
    const traits = { precedence: keypadFirst };
    expect(decided({ keypadRpm: 1200, closedInputs: 1, traits })).toMatchObject({
      source: 'keypad',
      rpm: 1200,
      lockedBy: undefined,
    });
    expect(decided({ traits: { precedence: [] } })).toMatchObject({ source: 'off', rpm: 0 });
  });

  it('answers any situation with a finite speed and one of the sources', () => {
    const rpm = fc.integer({ min: 600, max: 3450 });
    const nearNoon = fc.integer({ min: NOON - 86_400_000, max: NOON + 86_400_000 });
    const situations = fc.record({
      at: nearNoon,
      zone: fc.constantFrom(PHOENIX, 'Europe/Berlin', 'Mars/Olympus'),
      motorClockOffsetMinutes: fc.oneof(fc.integer({ min: -720, max: 720 }), fc.constant(Number.NaN)),
      closedInputs: fc.integer({ min: 0, max: 255 }),
      prime: fc.option(fc.record({ since: nearNoon, claimed: fc.boolean() }), { nil: undefined }),
      keypadRpm: fc.option(rpm, { nil: undefined }),
      timedSince: fc.option(nearNoon, { nil: undefined }),
      freezeSince: fc.option(nearNoon, { nil: undefined }),
      stopped: fc.boolean(),
    });
    const precedence = fc.shuffledSubarray([...SOURCES]);
    fc.assert(
      fc.property(situations, precedence, fc.boolean(), (situation, order, stopBeatsInputs) => {
        const decision = decided({ ...situation, traits: { precedence: order, stopBeatsInputs } });
        expect(Number.isFinite(decision.rpm)).toBe(true);
        expect(SOURCES).toContain(decision.source);
        if (decision.until !== undefined) expect(decision.until).toBeGreaterThan(situation.at);
      }),
    );
  });
});
