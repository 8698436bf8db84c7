import { describe, expect, it } from 'vitest';
import { COARSE, createPlayer, DAY, goodDay, HOUR, MINUTE, MONDAY, type Player } from './pump-player.ts';

const online = (boot: string) =>
  ({ state: 'online', connection: boot, boot, upSeconds: 3, firmware: '1.4.2' }) as const;

function night(player: Player, day: number, from: number, minutes: number, boot: string | undefined): void {
  player.playUntil(day, from, goodDay());
  player.silence(minutes * MINUTE);
  if (boot !== undefined) player.push({ kind: 'status', receivedAt: player.at, status: online(boot) });
}

describe('fed-through-clock', () => {
  it('raises on the second day that power goes at the same hour, explains the silence, and clears', () => {
    const player = createPlayer(COARSE);
    player.push({ kind: 'status', receivedAt: player.at, status: online('first') });
    night(player, 0, 1260, 400, 'b1');
    night(player, 1, 1264, 400, 'b2');
    player.playUntil(2, 600, goodDay());
    const raised = player.raised('fed-through-clock')[0]!;
    expect(raised).toMatchObject({ priority: 'soon', alarmClass: 'alarm', evidence: { days: 2 } });
    expect(Math.abs(raised.from - (MONDAY + 1260 * MINUTE))).toBeLessThanOrEqual(MINUTE);
    expect(player.raised('silent')).toHaveLength(1);

    player.playUntil(5, 0, goodDay());
    expect(player.standing('fed-through-clock')).toBeUndefined();
  });

  it('hears it without any status, from the gaps alone', () => {
    const player = createPlayer(COARSE);
    night(player, 0, 1260, 400, undefined);
    night(player, 1, 1258, 400, undefined);
    player.playUntil(2, 600, goodDay());
    expect(player.raised('fed-through-clock')).toHaveLength(1);
  });

  it('stays silent on a router that restarts each night, a link that drops and fills in, and a cut at another hour', () => {
    const router = createPlayer(COARSE);
    router.push({ kind: 'status', receivedAt: router.at, status: online('only') });
    for (let day = 0; day < 4; day += 1) night(router, day, 180, 4, 'only');
    expect(router.raised('fed-through-clock')).toEqual([]);

    const link = createPlayer(COARSE);
    link.push({ kind: 'status', receivedAt: link.at, status: online('only') });
    for (let day = 0; day < 3; day += 1) night(link, day, 1380, 120, 'only');
    expect(link.raised('fed-through-clock')).toEqual([]);

    const cuts = createPlayer(COARSE);
    cuts.push({ kind: 'status', receivedAt: cuts.at, status: online('first') });
    night(cuts, 0, 600, 90, 'b1');
    night(cuts, 1, 700, 90, 'b2');
    cuts.play(DAY + HOUR, goodDay());
    expect(cuts.raised('fed-through-clock')).toEqual([]);
  });
});
