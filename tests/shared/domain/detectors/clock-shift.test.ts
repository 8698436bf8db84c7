import { describe, expect, it } from 'vitest';
import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import {
  COARSE,
  clocks,
  createPlayer,
  DAY,
  goodDay,
  HOUR,
  MINUTE,
  MONDAY,
  type Player,
  type Scene,
} from './pump-player.ts';

const usual = clocks();
const late =
  (minutes: number) =>
  (at: number): Scene => ({ closedInputs: usual(at - minutes * MINUTE) });
const online = (boot: string) =>
  ({ state: 'online', connection: boot, boot, upSeconds: 3, firmware: '1.4.2' }) as const;

/** The power goes off for so long, with a new boot when it returns. */
function cutPower(player: Player, minutes: number): void {
  player.silence(minutes * MINUTE);
  player.push({ kind: 'status', receivedAt: player.at, status: online(`boot-${player.at}`) });
}

describe('clock-shift', () => {
  it('notes three edges that moved together, says by how much and which way, and clears when they are back', () => {
    const player = createPlayer(COARSE);
    player.playUntil(5, 0, goodDay());
    player.playUntil(7, 700, late(-50));
    expect(player.raised('clock-shift')).toHaveLength(1);
    const raised = player.raised('clock-shift')[0]!;
    expect(raised).toMatchObject({ alarmClass: 'note', priority: 'note', cause: 'trippers-moved' });
    expect(raised.evidence).toMatchObject({ minutes: 50, direction: 'fast' });
    expect(raised.from).toBe(MONDAY + 5 * DAY + 550 * MINUTE);

    player.playUntil(10, 0, goodDay());
    expect(player.standing('clock-shift')).toBeUndefined();
    expect(player.spoken()).toEqual(['clock-shift']);
  });

  it('needs two edges after a known cut, and names it', () => {
    const player = createPlayer(COARSE);
    player.push({ kind: 'status', receivedAt: player.at, status: online('first') });
    player.playUntil(5, 120, goodDay());
    cutPower(player, 150);
    player.playUntil(6, 800, late(150));
    expect(player.standing('clock-shift')).toMatchObject({ cause: 'power-cut', evidence: { direction: 'slow' } });
    expect(player.raised('clock-shift')).toHaveLength(1);
    expect(player.spoken().filter((detector) => detector !== 'silent')).toEqual(['clock-shift']);
  });

  it('names daylight saving, which a dial does not know', () => {
    const newYork = { ...COARSE, zone: 'America/New_York' };
    const start = Date.UTC(2025, 2, 3, 5);
    const player = createPlayer(newYork, start);
    // The dial goes on by winter time: its hours are the same instants of the day as before.
    player.playUntil(9, 0, (at) => ({ closedInputs: clocks(newYork, start)(at), reportedSource: undefined }));
    expect(player.standing('clock-shift')).toMatchObject({
      cause: 'daylight-saving',
      evidence: { minutes: 60, direction: 'slow' },
    });
  });

  it('names drift where it walked rather than stepped', () => {
    const player = createPlayer(COARSE);
    player.playUntil(14, 0, (at) => late(((at - MONDAY) / DAY) * 2)(at));
    expect(player.standing('clock-shift')?.cause).toBe('drift');
  });

  it('is for soon where the clock feeds the heater or covers a booster', () => {
    const heated: PumpContext = { ...COARSE, equipment: [{ kind: 'booster', input: 1, interlock: 'none' }] };
    const player = createPlayer(heated);
    player.playUntil(5, 0, goodDay());
    player.playUntil(8, 700, late(-50));
    expect(player.standing('clock-shift')?.priority).toBe('soon');
  });

  it('learns the hours nobody recorded, and takes a shift that stays for the usual time in the end', () => {
    const player = createPlayer({ ...COARSE, inputs: [{ number: 1, kind: 'clock', windows: [] }] });
    const only =
      (shift: number) =>
      (at: number): Scene => ({ closedInputs: usual(at - shift * MINUTE) & 1 });
    player.playUntil(7, 0, only(0));
    player.playUntil(10, 700, only(40));
    expect(player.standing('clock-shift')?.evidence).toMatchObject({ minutes: 40, direction: 'slow' });

    player.playUntil(26, 0, only(40));
    expect(player.standing('clock-shift')).toBeUndefined();
    expect(player.raised('clock-shift')).toHaveLength(1);
  });

  it('stays silent on edges that wander by ten minutes, a lever put on early, and one odd day', () => {
    const player = createPlayer(COARSE);
    player.playUntil(12, 0, (at) => {
      const day = Math.floor((at - MONDAY) / DAY);
      if (day === 6) return late(-120)(at);
      if (day === 8)
        return {
          closedInputs:
            usual(at) |
            (at - MONDAY - day * DAY > 8 * HOUR && usual(at - 0) !== 2 && at - MONDAY - day * DAY < 820 * MINUTE
              ? 1
              : 0),
        };
      return late([0, 9, -8, 6, -9, 4, 0, 8, 0, -7, 5, 2][day] ?? 0)(at);
    });
    expect(player.signals).toEqual([]);
  });
});
