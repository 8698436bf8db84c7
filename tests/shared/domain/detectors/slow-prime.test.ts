import { describe, expect, it } from 'vitest';
import { createPlayer, MINUTE, type Player, SECOND } from './pump-player.ts';

/** One start a day that takes so long to carry load; the rest of the day at the recorded pace. */
function startAfter(player: Player, day: number, seconds: number): void {
  player.playUntil(day, 360, {}, 10 * SECOND);
  player.play(seconds * SECOND, { load: 0.35 });
  player.play(5 * MINUTE, {});
  player.playUntil(day, 400, {}, 10 * SECOND);
  player.playUntil(day + 1, 0, { rpm: 0, reportedSource: 'stop' }, 10 * SECOND);
}

function play(seconds: readonly number[]): Player {
  const player = createPlayer();
  for (const [day, one] of seconds.entries()) startAfter(player, day, one);
  return player;
}

const TAUGHT = [30, 40, 30, 30, 40, 30, 30, 40, 30, 30];

describe('slow-prime', () => {
  it('notes five starts that take twice the usual time, from the first, and clears when it is quick again', () => {
    const player = play([...TAUGHT, 90, 100, 110, 100, 120]);
    const raised = player.raised('slow-prime')[0]!;
    expect(raised).toMatchObject({ alarmClass: 'note', cause: 'air-leak' });
    expect(raised.evidence.usualRatio).toBeGreaterThan(2);
    expect(raised.at - raised.from).toBeGreaterThan(3 * 86_400_000);

    for (let day = 15; day < 21; day += 1) startAfter(player, day, 30);
    expect(player.standing('slow-prime')).toBeUndefined();
    expect(player.raised('slow-prime')).toHaveLength(1);
  });

  it('stays silent after a lid was opened once or twice, before ten starts, and on one reading more or less', () => {
    expect(play([...TAUGHT, 100, 30, 110, 30, 40, 30]).raised('slow-prime')).toEqual([]);
    expect(play([30, 40, 30, 100, 110, 100, 110, 100]).raised('slow-prime')).toEqual([]);
    expect(play([...TAUGHT, 50, 50, 40, 50, 50, 50]).raised('slow-prime')).toEqual([]);
  });
});
