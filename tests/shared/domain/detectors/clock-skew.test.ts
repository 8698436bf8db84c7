import { describe, expect, it } from 'vitest';
import { createPlayer, type Player, SECOND } from './pump-player.ts';

function say(player: Player, at: number, receivedAt: number, single = true): void {
  player.push({
    kind: 'reading',
    single,
    receivedAt,
    reading: { at, rpm: 0, closedInputs: 0, activeInput: 0, watts: 3 },
  });
}

describe('clock-skew', () => {
  it('notes three single messages in a row more than two minutes behind, and clears with three in time', () => {
    const player = createPlayer();
    const start = player.at;
    for (let step = 0; step < 3; step += 1)
      say(player, start + step * 10 * SECOND, start + step * 10 * SECOND + 200 * SECOND);
    expect(player.raised('clock-skew')[0]).toMatchObject({ alarmClass: 'note', from: start + 200 * SECOND });
    expect(player.raised('clock-skew')[0]?.evidence.skewMinutes).toBeCloseTo(3.3, 1);

    for (let step = 30; step < 33; step += 1)
      say(player, start + step * 10 * SECOND, start + step * 10 * SECOND + SECOND);
    expect(player.standing('clock-skew')).toBeUndefined();
  });

  it('stays silent on a backlog, in arrays or one by one, and on a slow network', () => {
    const player = createPlayer();
    const start = player.at;
    for (let step = 0; step < 60; step += 1) say(player, start + step * 10 * SECOND, start + 700 * SECOND, false);
    for (let step = 60; step < 120; step += 1)
      say(player, start + step * 10 * SECOND, start + 1300 * SECOND + step * 50);
    for (let step = 130; step < 160; step += 1)
      say(player, start + step * 10 * SECOND, start + step * 10 * SECOND + 90 * SECOND);
    expect(player.signals).toEqual([]);
  });

  it('begins to count anew when the device comes online', () => {
    const player = createPlayer();
    const start = player.at;
    const online = { state: 'online', connection: 'c', boot: 'b', upSeconds: 1, firmware: '1' } as const;
    say(player, start, start + 200 * SECOND);
    say(player, start + 10 * SECOND, start + 210 * SECOND);
    player.push({ kind: 'status', receivedAt: start + 215 * SECOND, status: online });
    say(player, start + 20 * SECOND, start + 220 * SECOND);
    expect(player.signals).toEqual([]);
  });
});
