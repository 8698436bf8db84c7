import { describe, expect, it } from 'vitest';
import { CONTEXT, createPlayer, HOUR, MINUTE } from './pump-player.ts';

const UNPROTECTED = { ...CONTEXT, settings: { ...CONTEXT.settings, freeze: null } };
const still = (ambientCelsius: number) => ({ rpm: 0, reportedSource: 'off' as const, ambientCelsius });

describe('freezing', () => {
  it('raises urgently after half an hour at or below 0 °C with a still pump, and clears once it turns', () => {
    const player = createPlayer(UNPROTECTED);
    player.play(HOUR, still(8));
    const onset = player.at;
    player.play(32 * MINUTE, still(-1));
    const raised = player.raised('freezing')[0]!;

    expect(raised).toMatchObject({ priority: 'urgent', alarmClass: 'alarm', from: onset });
    expect(raised.at).toBe(onset + 30 * MINUTE);

    player.play(15 * MINUTE, { rpm: 1150, reportedSource: 'keypad', ambientCelsius: -1 });
    expect(player.standing('freezing')).toBeUndefined();
    expect(player.spoken()).toEqual(['freezing']);
  });

  it('is for soon under the guard with protection set, then urgent at 0 °C', () => {
    const player = createPlayer();
    player.play(40 * MINUTE, still(3.2));
    expect(player.standing('freezing')).toMatchObject({ priority: 'soon', evidence: { protectionSet: true } });

    player.play(5 * MINUTE, still(-0.2));
    expect(player.standing('freezing')).toMatchObject({ type: 'changed', priority: 'urgent' });
  });

  it('is a note at 4.4 °C with protection off', () => {
    const player = createPlayer(UNPROTECTED);
    player.play(40 * MINUTE, still(3.2));
    expect(player.standing('freezing')).toMatchObject({ priority: 'note', alarmClass: 'note' });
  });

  it('takes an evening about the guard, with one reading far below it, for no frost', () => {
    const player = createPlayer();
    player.play(3 * HOUR, (at) => still(at % 7 === 0 ? 3.3 : 4.7));
    player.play(10_000, still(3.2));
    player.play(HOUR, still(4.8));
    expect(player.signals).toEqual([]);
  });

  it('explains a pump that stands still when a speed is due', () => {
    const player = createPlayer();
    player.playUntil(0, 420, { ambientCelsius: 6 });
    player.play(HOUR, { rpm: 0, ambientCelsius: -2 });
    expect(player.spoken()).toEqual(['freezing']);
  });

  it('stays silent while protection runs and checks again, around the guard, and on a winterized pad', () => {
    const player = createPlayer();
    player.play(4 * HOUR, (at) => ({ rpm: 1150, reportedSource: 'freeze', ambientCelsius: at % 3 === 0 ? -4 : -4.2 }));
    player.play(2 * HOUR, (at) => still(4.4 + Math.sin(at / 60_000) * 0.25));
    expect(player.signals).toEqual([]);

    const winter = createPlayer({ ...CONTEXT, padState: 'winterized' });
    winter.play(6 * HOUR, still(-9));
    expect(winter.signals).toEqual([]);
  });
});
