import { describe, expect, it } from 'vitest';
import { CONTEXT, createPlayer, DAY, MINUTE, MONDAY, type Scene } from './pump-player.ts';

const PLAIN = { ...CONTEXT, inputs: [] };

/** A motor that shows its own clock, so many minutes ahead of Phoenix. */
const shows =
  (ahead: number) =>
  (at: number): Scene => ({
    clockAhead: ahead,
    motorClockMinute: Math.floor(((at - MONDAY) / MINUTE + ahead + 1440) % 1440),
  });
const online = (boot: string) =>
  ({ state: 'online', connection: boot, boot, upSeconds: 3, firmware: '1.4.2' }) as const;

describe('motor-clock', () => {
  it('notes a clock that shows itself off for an hour, and clears when it is set', () => {
    const player = createPlayer(PLAIN);
    player.playUntil(1, 0, shows(0));
    player.playUntil(1, 62, shows(-25));
    expect(player.standing('motor-clock')).toMatchObject({
      alarmClass: 'note',
      evidence: { minutes: 25, direction: 'slow', knownFrom: 'says' },
    });

    player.playUntil(1, 90, shows(1));
    expect(player.standing('motor-clock')).toBeUndefined();
    expect(player.spoken()).toEqual(['motor-clock']);
  });

  it('learns it from three edges of the program where the clock is not shown', () => {
    const player = createPlayer(PLAIN);
    player.playUntil(3, 0, {});
    player.playUntil(4, 500, (at) => (at < MONDAY + 3 * DAY + 300 * MINUTE ? {} : { clockAhead: -40 }));
    const raised = player.raised('motor-clock')[0]!;
    expect(raised).toMatchObject({ evidence: { minutes: 40, direction: 'slow', knownFrom: 'edges' } });

    player.playUntil(6, 500, { clockAhead: 0 });
    expect(player.standing('motor-clock')).toBeUndefined();
  });

  it('believes a clock that was set at its first edge on time, and speaks of no run that the old offset forbids', () => {
    const player = createPlayer(PLAIN);
    player.playUntil(3, 0, {});
    player.playUntil(6, 0, { clockAhead: -80 });
    expect(player.standing('motor-clock')).toBeDefined();

    player.playUntil(6, 480, { clockAhead: 0 });
    expect(player.standing('motor-clock')).toBeUndefined();
    expect(player.raised('unexpected-run').filter(({ at }) => at > MONDAY + 6 * DAY)).toEqual([]);
  });

  it.each([['drift', (at: number) => shows(Math.floor(((at - MONDAY) / DAY) * 8))(at)]])('names %s', (cause, scene) => {
    const player = createPlayer(PLAIN);
    player.playUntil(3, 0, scene);
    expect(player.standing('motor-clock')?.cause).toBe(cause);
  });

  it('names the power cut that it equals', () => {
    const player = createPlayer(PLAIN);
    player.push({ kind: 'status', receivedAt: player.at, status: online('a') });
    player.playUntil(1, 60, shows(0));
    player.silence(45 * MINUTE);
    player.push({ kind: 'status', receivedAt: player.at, status: online('b') });
    player.playUntil(1, 300, shows(-45));
    expect(player.standing('motor-clock')?.cause).toBe('power-cut');
  });

  it('names daylight saving, which a motor does not know, and speaks of nothing else', () => {
    const start = Date.UTC(2025, 2, 7, 5);
    const player = createPlayer({ ...CONTEXT, zone: 'America/New_York', inputs: [] }, start);
    player.playUntil(6, 0, {});
    expect(player.spoken()).toEqual(['motor-clock']);
    expect(player.standing('motor-clock')).toMatchObject({
      cause: 'daylight-saving',
      evidence: { minutes: 60, direction: 'slow' },
    });
  });

  it('waits with what a lost clock explains until the edges tell', () => {
    const player = createPlayer(PLAIN);
    player.push({ kind: 'status', receivedAt: player.at, status: online('a') });
    player.playUntil(3, 120, {});
    player.silence(50 * MINUTE);
    player.push({ kind: 'status', receivedAt: player.at, status: online('b') });
    player.playUntil(6, 0, { clockAhead: -50 });
    expect(player.spoken()).toEqual(['motor-clock']);
    expect(player.standing('motor-clock')?.cause).toBe('power-cut');
  });

  it('stays silent on a clock a few minutes off, and on a pump started late by hand', () => {
    const player = createPlayer(PLAIN);
    player.playUntil(3, 0, shows(9));
    expect(player.signals).toEqual([]);

    const byHand = createPlayer(PLAIN);
    byHand.playUntil(1, 380, (at) => (at < MONDAY + DAY + 360 * MINUTE ? {} : { rpm: 0, reportedSource: 'stop' }));
    byHand.playUntil(3, 0, {});
    expect(byHand.signals).toEqual([]);
  });
});
