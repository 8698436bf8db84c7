import { describe, expect, it } from 'vitest';
import type { MotorSettings } from '#shared/domain/control/motor-settings.ts';
import { CONTEXT, createPlayer, goodDay, HOUR, MINUTE, SETTINGS } from './pump-player.ts';

const report = (settings: Partial<MotorSettings>, receivedAt: number) => ({
  kind: 'settings' as const,
  settings,
  receivedAt,
});

describe('settings-changed', () => {
  it('notes at once what differs from the commissioned settings, and clears when it is set back', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    player.push(report({ ...SETTINGS, inputs: [3000, 2400, null] }, player.at));
    expect(player.standing('settings-changed')).toMatchObject({
      alarmClass: 'note',
      evidence: { changes: 1, changed: ['inputs'], inputsReported: '[3000,2400,null]' },
    });

    player.push(report(SETTINGS, player.at + HOUR));
    expect(player.standing('settings-changed')).toBeUndefined();
  });

  it('takes a speed that fits the reported settings for its consequence', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    player.push(report({ inputs: [3000, 2400, null], program: [{ ...SETTINGS.program[0]!, rpm: 2000 }] }, player.at));
    player.play(2 * HOUR, { rpm: 2000 });
    player.play(2 * HOUR, { closedInputs: 1, activeInput: 1, rpm: 3000 });
    expect(player.spoken()).toEqual(['settings-changed']);

    player.play(10 * MINUTE, { closedInputs: 1, activeInput: 1, rpm: 2600 });
    expect(player.spoken()).toEqual(['settings-changed', 'wrong-speed']);
  });

  it('takes a run by the reported program for its consequence', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    player.push(report({ program: [{ ...SETTINGS.program[0]!, toMinute: 1380 }] }, player.at));
    player.playUntil(0, 1200, goodDay());
    player.playUntil(0, 1380, { rpm: 1700, reportedSource: 'program' });
    expect(player.spoken()).toEqual(['settings-changed']);
  });

  it('takes standing still by the reported program for its consequence', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    player.push(report({ program: [{ ...SETTINGS.program[0]!, fromMinute: 900 }] }, player.at));
    player.play(60 * MINUTE, { rpm: 0, watts: 4, reportedSource: 'off' });
    expect(player.spoken()).toEqual(['settings-changed']);
  });

  it('waits until our visit is over, and ends when the change is taken over', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    player.push({ kind: 'on-site', receivedAt: player.at, on: true });
    player.push(report({ maxRpm: 3000 }, player.at));
    expect(player.signals).toEqual([]);
    player.push({ kind: 'on-site', receivedAt: player.at + MINUTE, on: false });
    expect(player.standing('settings-changed')).toBeDefined();

    player.restart({ ...CONTEXT, settings: { ...SETTINGS, maxRpm: 3000 } });
    player.play(MINUTE, {});
    expect(player.standing('settings-changed')).toBeUndefined();
  });

  it('stays silent on a report that says the same in other words, or only part of it', () => {
    const player = createPlayer();
    player.push(report({ inputs: [2850, 2400], prime: { seconds: 180, rpm: 3450 }, timed: SETTINGS.timed }, player.at));
    player.push(report({ maxRpm: 3450 }, player.at));
    expect(player.signals).toEqual([]);
  });
});
