import { describe, expect, it } from 'vitest';
import { createPlayer, DAY, goodDay, HOUR, MINUTE } from './pump-player.ts';

const online = (boot: string, connection = 'c1') =>
  ({ state: 'online', connection, boot, upSeconds: 5, firmware: '1.4.2' }) as const;

function connected() {
  const player = createPlayer();
  player.push({ kind: 'status', receivedAt: player.at, status: online('b1') });
  player.playUntil(0, 700, goodDay());
  return player;
}

describe('silent', () => {
  it('raises an hour after the last word, grows soon after three days, and clears after ten minutes of words', () => {
    const player = connected();
    const lastWord = player.at - 10_000 + 400;
    player.push({ kind: 'status', receivedAt: player.at, status: { state: 'lost', connection: 'c1' } });
    player.silence(59 * MINUTE);
    expect(player.signals).toEqual([]);

    player.silence(3 * MINUTE);
    expect(player.standing('silent')).toMatchObject({ priority: 'note', cause: 'unknown', from: lastWord });

    player.silence(72 * HOUR);
    expect(player.standing('silent')?.priority).toBe('soon');

    player.play(12 * MINUTE, goodDay());
    expect(player.standing('silent')).toBeUndefined();
    expect(player.spoken()).toEqual(['silent']);
  });

  it('tells a device that hung from a power cut by the connection that stayed', () => {
    const player = connected();
    player.push({ kind: 'status', receivedAt: player.at, status: { state: 'lost', connection: 'c1' } });
    player.push({ kind: 'status', receivedAt: player.at, status: online('b1', 'c2') });
    player.play(HOUR, goodDay());
    player.silence(2 * HOUR);
    expect(player.standing('silent')?.cause).toBe('device');

    player.push({ kind: 'status', receivedAt: player.at, status: online('b2', 'c3') });
    player.play(10_000, { rpm: 0, reportedSource: 'off' });
    player.play(20 * MINUTE, goodDay());
    expect(player.signals.filter(({ detector }) => detector === 'silent').at(-2)).toMatchObject({ cause: 'device' });
  });

  it.each([
    ['power', 'b2', { rpm: 0, reportedSource: 'off' as const }],
    ['link', 'b1', {}],
    ['device', 'b2', {}],
  ])('learns %s from what comes back', (cause, boot, first) => {
    const player = connected();
    player.push({ kind: 'status', receivedAt: player.at, status: { state: 'lost', connection: 'c1' } });
    player.silence(2 * HOUR);
    player.push({ kind: 'status', receivedAt: player.at, status: online(boot, 'c2') });
    player.play(10_000, first);
    player.play(20 * MINUTE, goodDay());

    expect(player.signals.find((signal) => signal.type === 'changed')).toMatchObject({ detector: 'silent', cause });
    expect(player.standing('silent')).toBeUndefined();
  });

  it('takes a device that speaks after its will for there, and silent again when it stops', () => {
    const player = connected();
    player.push({ kind: 'status', receivedAt: player.at, status: { state: 'lost', connection: 'c1' } });
    player.play(5 * MINUTE, goodDay());
    player.silence(2 * HOUR);

    expect(player.standing('silent')?.cause).toBe('device');
  });

  it('blames the device where it is connected and says nothing', () => {
    const player = connected();
    player.silence(2 * HOUR);

    expect(player.standing('silent')?.cause).toBe('device');
  });

  it('is urgent in frost', () => {
    const player = createPlayer();
    player.playUntil(0, 700, { ambientCelsius: -3 });
    player.silence(2 * HOUR);

    expect(player.standing('silent')?.priority).toBe('urgent');
  });

  it('stays silent while the server was down, through a router that restarts, and before the first word', () => {
    const player = connected();
    const down = player.at + 5 * HOUR;
    player.push({ kind: 'listening', receivedAt: down });
    player.push({ kind: 'time', receivedAt: down + 59 * MINUTE });
    expect(player.signals).toEqual([]);

    const router = connected();
    for (let night = 0; night < 5; night += 1) {
      router.silence(4 * MINUTE);
      router.play(DAY / 4, goodDay());
    }
    expect(router.raised('silent')).toEqual([]);

    const never = createPlayer();
    never.silence(5 * HOUR);
    expect(never.signals).toEqual([]);
  });

  it('counts a late reading as a word', () => {
    const player = connected();
    const old = { at: player.at - HOUR, rpm: 1700, closedInputs: 0, activeInput: 0, watts: 240 };
    for (let minute = 1; minute < 120; minute += 1) {
      player.push({ kind: 'reading', reading: old, receivedAt: player.at + minute * MINUTE, single: true });
    }
    expect(player.signals).toEqual([]);
  });
});
