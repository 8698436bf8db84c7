import { describe, expect, it } from 'vitest';
import { createPlayer, goodDay, HOUR, MINUTE, MONDAY } from './pump-player.ts';

const TRIPPED = { rpm: 0, watts: 5, fault: 'E07', reportedSource: 'fault' as const };

describe('drive-fault', () => {
  it('raises at once with the code as its cause, grows urgent after ten minutes, explains the stop, and clears', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    player.play(10_000, TRIPPED);
    expect(player.standing('drive-fault')).toMatchObject({
      cause: 'E07',
      priority: 'soon',
      from: MONDAY + 500 * MINUTE,
    });

    player.play(40 * MINUTE, TRIPPED);
    expect(player.standing('drive-fault')?.priority).toBe('urgent');
    expect(player.spoken()).toEqual(['drive-fault']);

    player.play(15 * MINUTE, {});
    expect(player.standing('drive-fault')).toBeUndefined();
  });

  it('is one urgent alarm for a drive that trips and tries again three times in a day', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    for (let trip = 0; trip < 4; trip += 1) {
      player.play(2 * MINUTE, TRIPPED);
      player.play(5 * MINUTE, {});
    }
    expect(player.raised('drive-fault')).toHaveLength(1);
    expect(player.standing('drive-fault')?.priority).toBe('urgent');
  });

  it('stays silent on a healthy day', () => {
    const player = createPlayer();
    player.play(30 * HOUR, goodDay());
    expect(player.signals).toEqual([]);
  });
});
