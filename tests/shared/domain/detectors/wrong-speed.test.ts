import { describe, expect, it } from 'vitest';
import { CONTEXT, createPlayer, createRandom, goodDay, HOUR, MINUTE, MONDAY } from './pump-player.ts';

const NOON = { closedInputs: 1 };

describe('wrong-speed', () => {
  it('raises three minutes after a closed input is ignored, names it, and clears once it is obeyed', () => {
    const player = createPlayer();
    player.playUntil(0, 600, goodDay());
    player.play(10 * MINUTE, { closedInputs: 1, activeInput: 0, rpm: 1700, reportedSource: 'program' });
    const raised = player.raised('wrong-speed')[0]!;

    expect(raised).toMatchObject({ cause: 'ignores-input', priority: 'soon', alarmClass: 'alarm' });
    const onset = MONDAY + 600 * MINUTE;
    expect(raised.at - onset).toBeGreaterThanOrEqual(3 * MINUTE);
    expect(raised.at - onset).toBeLessThanOrEqual(3 * MINUTE + 60_000);
    expect(raised).toHaveProperty('evidence.input', 1);

    player.play(10 * MINUTE, NOON);
    expect(player.standing('wrong-speed')).toBeUndefined();
    expect(player.spoken()).toEqual(['wrong-speed']);
  });

  it.each([
    ['follows-lower-input', { closedInputs: 3, activeInput: 2, rpm: 2400 }],
    ['follows-lower-input', { closedInputs: 3, activeInput: 1, rpm: 2400 }],
    ['ignores-input', { closedInputs: 1, activeInput: 0, rpm: 1700 }],
    ['runs-input-open', { closedInputs: 0, activeInput: 1, rpm: 2850 }],
    ['runs-input-open', { closedInputs: 0, activeInput: 0, rpm: 2850, reportedSource: 'program' as const }],
    ['runs-input-open', { closedInputs: 2, activeInput: 0, rpm: 2850, reportedSource: 'program' as const }],
    ['unknown-speed', { closedInputs: 1, activeInput: 1, rpm: 2600 }],
    ['derating', { closedInputs: 1, activeInput: 1, rpm: 2600, driveCelsius: 88 }],
    ['power-limit', { closedInputs: 1, activeInput: 1, rpm: 2600, load: 1.35 }],
  ])('names %s', (cause, scene) => {
    const player = createPlayer();
    player.playUntil(0, 540, goodDay());
    player.play(20 * MINUTE, scene);

    expect(player.spoken()).toEqual(['wrong-speed']);
    expect(player.standing('wrong-speed')?.cause).toBe(cause);
  });

  it('judges a speed near its limit by the mean, so that noise neither raises it nor holds it back', () => {
    const limit = 57;
    const noise = createRandom(3);
    const by = (rpm: number) => () => ({ closedInputs: 1, activeInput: 1, rpm: 2850 - rpm + (noise() - 0.5) * 8 });
    const inside = createPlayer();
    inside.playUntil(0, 600, goodDay());
    inside.play(2 * HOUR, by(limit - 2));
    expect(inside.signals).toEqual([]);

    const outside = createPlayer();
    outside.playUntil(0, 600, goodDay());
    outside.play(8 * MINUTE, by(limit + 3));
    expect(outside.spoken()).toEqual(['wrong-speed']);
  });

  it('forgives a clock known from its edges alone that has since moved by some minutes', () => {
    const program = [
      { days: CONTEXT.settings.program[0]!.days, fromMinute: 360, toMinute: 720, rpm: 1700 },
      { days: CONTEXT.settings.program[0]!.days, fromMinute: 720, toMinute: 1200, rpm: 2200 },
    ];
    const context = { ...CONTEXT, inputs: [], settings: { ...CONTEXT.settings, program } };
    const player = createPlayer(context);
    player.playUntil(3, 0, {}, MINUTE);
    player.playUntil(4, 0, { clockAhead: -8 });
    expect(player.signals).toEqual([]);

    player.playUntil(4, 700, {});
    player.play(60 * MINUTE, { rpm: 1700, reportedSource: 'program' });
    expect(player.spoken()).toEqual(['wrong-speed']);
  });

  it('ends when its situation has not come again for three days', () => {
    const player = createPlayer();
    player.playUntil(0, 600, goodDay());
    player.play(HOUR, { closedInputs: 3, activeInput: 2, rpm: 2400 });
    expect(player.spoken()).toEqual(['wrong-speed']);

    const onlySecond = (at: number) => ({ closedInputs: (at - MONDAY) % (24 * HOUR) > 11 * HOUR ? 2 : 0 });
    player.playUntil(2, 0, onlySecond, MINUTE);
    expect(player.standing('wrong-speed')).toBeDefined();
    player.playUntil(4, 0, onlySecond, MINUTE);
    expect(player.standing('wrong-speed')).toBeUndefined();
  });

  it('is not cured by a situation that cannot show it', () => {
    const player = createPlayer();
    player.playUntil(0, 600, goodDay());
    player.play(HOUR, { closedInputs: 1, activeInput: 0, rpm: 1700, reportedSource: 'program' });
    player.play(2 * HOUR, { closedInputs: 0 });
    expect(player.standing('wrong-speed')?.cause).toBe('ignores-input');

    player.play(10 * MINUTE, { closedInputs: 1 });
    expect(player.standing('wrong-speed')).toBeUndefined();
  });

  it('stays silent through ramps, primes, the keypad and timed runs, and near a program edge', () => {
    const player = createPlayer();
    player.playUntil(0, 355, {});
    player.playUntil(0, 368, { clockAhead: -8 });
    player.playUntil(0, 600, {});
    player.play(2 * HOUR, { rpm: 2200, reportedSource: 'keypad' });
    player.play(45 * MINUTE, { rpm: 3200, reportedSource: 'timed' });
    player.play(HOUR, goodDay());
    player.playUntil(2, 0, goodDay());

    expect(player.signals).toEqual([]);
  });

  it('waits longer where the pump never says what commands it', () => {
    const player = createPlayer();
    player.playUntil(0, 700, { reportedSource: undefined });
    player.play(2 * HOUR, { reportedSource: undefined, rpm: 2200 });
    player.play(2 * HOUR, { reportedSource: undefined });
    expect(player.signals).toEqual([]);
  });

  it('stays silent under noise and at speeds within tolerance', () => {
    const player = createPlayer();
    player.playUntil(0, 700, (at) => (at % 20_000 === 0 && at > MONDAY + 365 * MINUTE ? { rpm: 1735 } : {}));
    expect(player.spoken()).toEqual([]);
  });
});
