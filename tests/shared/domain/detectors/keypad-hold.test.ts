import { describe, expect, it } from 'vitest';
import { createPlayer, goodDay, HOUR, MINUTE } from './pump-player.ts';

const MANUAL = { rpm: 2200, reportedSource: 'keypad' as const };

describe('keypad-hold', () => {
  it('notes a pump on manual for twelve hours, from the moment it went on, and clears on its program', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    const onset = player.at;
    player.play(12 * HOUR + MINUTE, MANUAL);
    expect(player.raised('keypad-hold')[0]).toMatchObject({ alarmClass: 'note', from: onset, at: onset + 12 * HOUR });

    player.playUntil(1, 380, {});
    expect(player.standing('keypad-hold')).toBeUndefined();
    expect(player.spoken()).toEqual(['keypad-hold']);
  });

  it('counts on through a clock that takes over for a while', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    player.play(2 * HOUR, MANUAL);
    player.play(3 * HOUR, { closedInputs: 1 });
    player.play(7 * HOUR + 5 * MINUTE, MANUAL);
    expect(player.spoken()).toEqual(['keypad-hold']);
  });

  it('notes within half an hour what our own visit left on manual', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    player.push({ kind: 'on-site', receivedAt: player.at, on: true });
    player.play(40 * MINUTE, MANUAL);
    player.push({ kind: 'on-site', receivedAt: player.at, on: false });
    player.play(31 * MINUTE, MANUAL);
    expect(player.raised('keypad-hold')[0]).toMatchObject({ evidence: { sinceOurVisit: true } });
  });

  it('stays silent on vacuuming on manual and a pump cleaned by its owner after our visit', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    player.push({ kind: 'on-site', receivedAt: player.at, on: true });
    player.play(20 * MINUTE, {});
    player.push({ kind: 'on-site', receivedAt: player.at, on: false });
    player.play(4 * HOUR, MANUAL);
    player.playUntil(1, 500, goodDay());
    expect(player.signals).toEqual([]);
  });
});
