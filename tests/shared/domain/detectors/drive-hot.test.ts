import { describe, expect, it } from 'vitest';
import { createPlayer, goodDay, MINUTE } from './pump-player.ts';

describe('drive-hot', () => {
  it('notes a drive over its limit for ten minutes, and clears five degrees below', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    player.play(12 * MINUTE, { driveCelsius: 93 });
    expect(player.standing('drive-hot')).toMatchObject({
      alarmClass: 'note',
      priority: 'note',
      evidence: { limitCelsius: 90 },
    });

    player.play(30 * MINUTE, { driveCelsius: 88 });
    expect(player.standing('drive-hot')).toBeDefined();
    player.play(15 * MINUTE, { driveCelsius: 80 });
    expect(player.standing('drive-hot')).toBeUndefined();
    expect(player.spoken()).toEqual(['drive-hot']);
  });

  it('is for soon once the drive slowed down for two hours on three days', () => {
    const player = createPlayer();
    const closed = goodDay();
    for (let day = 0; day < 3; day += 1) {
      player.playUntil(day, 610, closed);
      player.playUntil(day, 760, { closedInputs: 1, rpm: 2600, activeInput: 1, driveCelsius: 96 });
    }
    player.play(5 * MINUTE, { closedInputs: 1, rpm: 2600, activeInput: 1, driveCelsius: 96 });
    expect(player.signals.filter(({ detector }) => detector === 'drive-hot').at(-1)).toMatchObject({
      priority: 'soon',
    });
  });

  it('stays silent through a heat wave below the limit', () => {
    const player = createPlayer();
    player.playUntil(2, 0, (at) => ({
      ...goodDay()(at),
      driveCelsius: 84 + Math.sin(at / 40_000) * 4,
      ambientCelsius: 46,
    }));
    expect(player.signals).toEqual([]);
  });
});
