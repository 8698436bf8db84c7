import { describe, expect, it } from 'vitest';
import { createPlayer, goodDay, HOUR, MINUTE, type Player, SECOND } from './pump-player.ts';

/** Opens and closes input 1 so many times, so far apart. */
function chatter(player: Player, transitions: number, every: number): void {
  for (let step = 0; step < transitions; step += 1) player.play(every, { closedInputs: step % 2 === 0 ? 1 : 0 }, every);
}

describe('chattering-input', () => {
  it('raises at the sixth transition in five minutes, names a loose wire, and clears after a quiet day', () => {
    const player = createPlayer();
    player.playUntil(0, 480, goodDay());
    chatter(player, 5, 40 * SECOND);
    expect(player.signals).toEqual([]);
    chatter(player, 2, 40 * SECOND);
    expect(player.standing('chattering-input')).toMatchObject({
      priority: 'soon',
      cause: 'loose-wire',
      evidence: { input: 1 },
    });

    player.play(27 * HOUR, goodDay());
    expect(player.standing('chattering-input')).toBeUndefined();
    expect(player.spoken()).toEqual(['chattering-input']);
  });

  it('raises on a wire that chatters every few seconds', () => {
    const player = createPlayer();
    player.playUntil(0, 480, goodDay());
    chatter(player, 24, 4 * SECOND);
    expect(player.spoken()).toEqual(['chattering-input']);
  });

  it('names the switch that bounces at its tripper on three days', () => {
    const player = createPlayer();
    for (let day = 1; day <= 3; day += 1) {
      player.playUntil(day, 600, goodDay());
      chatter(player, 8, 3 * SECOND);
      expect(player.raised('chattering-input')).toHaveLength(day === 3 ? 1 : 0);
    }
    expect(player.standing('chattering-input')?.cause).toBe('switch-failing');
  });

  it('stays silent on an edge that bounces, a toggle played with, and a solar controller that cycles', () => {
    const player = createPlayer();
    player.playUntil(1, 600, goodDay());
    chatter(player, 20, 300);
    chatter(player, 3, SECOND);
    player.playUntil(1, 850, goodDay());
    chatter(player, 4, 50 * SECOND);
    for (let cycle = 0; cycle < 20; cycle += 1) {
      player.play(4 * MINUTE, { closedInputs: 2 });
      player.play(6 * MINUTE, { closedInputs: 0 });
    }
    expect(player.signals).toEqual([]);
  });
});
