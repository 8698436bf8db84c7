import { describe, expect, it } from 'vitest';
import { CONTEXT, createPlayer, goodDay, HOUR, MINUTE, MONDAY } from './pump-player.ts';

const DEAD = { rpm: 0, watts: 4, reportedSource: undefined };

describe('stopped', () => {
  it('raises twenty minutes after a due speed went missing, and clears once the shaft turns', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    player.play(25 * MINUTE, DEAD);
    const raised = player.raised('stopped')[0]!;

    expect(raised).toMatchObject({ cause: 'unknown', priority: 'soon', from: MONDAY + 500 * MINUTE });
    expect(raised.at).toBe(MONDAY + 520 * MINUTE);
    expect(raised).toHaveProperty('evidence.expectedRpm', 1700);

    player.play(12 * MINUTE, {});
    expect(player.standing('stopped')).toBeUndefined();
    expect(player.spoken()).toEqual(['stopped']);
  });

  it('gives a keypad stop two hours and names it', () => {
    const player = createPlayer();
    player.playUntil(0, 480, goodDay());
    player.play(110 * MINUTE, { ...DEAD, reportedSource: 'stop' });
    expect(player.signals).toEqual([]);

    player.play(15 * MINUTE, { ...DEAD, reportedSource: 'stop' });
    expect(player.standing('stopped')).toMatchObject({ cause: 'keypad-stop', from: MONDAY + 480 * MINUTE });
  });

  it('counts nothing of a keypad stop against what comes after it', () => {
    const player = createPlayer();
    player.playUntil(0, 480, goodDay());
    player.play(100 * MINUTE, { ...DEAD, reportedSource: 'stop' });
    player.play(19 * MINUTE, { ...DEAD, reportedSource: 'program' });
    expect(player.signals).toEqual([]);

    player.play(3 * MINUTE, { ...DEAD, reportedSource: 'program' });
    expect(player.standing('stopped')?.cause).toBe('unknown');
  });

  it('believes no keypad stop where a closed input beats it', () => {
    const player = createPlayer({ ...CONTEXT, traits: { ...CONTEXT.traits, stopBeatsInputs: false } });
    player.playUntil(0, 620, goodDay());
    player.play(25 * MINUTE, { ...DEAD, closedInputs: 1, reportedSource: 'stop' });

    expect(player.standing('stopped')?.cause).toBe('unknown');
  });

  it('says fault where the motor does without a code', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    player.play(25 * MINUTE, { ...DEAD, reportedSource: 'fault' });

    expect(player.standing('stopped')?.cause).toBe('fault');
  });

  it('grows urgent after six hours', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    player.play(6 * HOUR + 5 * MINUTE, DEAD);

    expect(player.standing('stopped')).toMatchObject({ type: 'changed', priority: 'urgent' });
  });

  it('is one alarm over a night in which nothing is due', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    player.playUntil(2, 700, DEAD);

    expect(player.raised('stopped')).toHaveLength(1);
    expect(player.standing('stopped')).toBeDefined();
  });

  it('stays silent while a basket is cleaned, a filter backwashed, and through the night', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    player.play(15 * MINUTE, { ...DEAD, reportedSource: 'stop' });
    player.playUntil(0, 900, goodDay());
    player.play(12 * MINUTE, DEAD);
    player.playUntil(3, 0, goodDay());

    expect(player.signals).toEqual([]);
  });

  it('stays silent on a winterized pad, on one under repair, and while we are on site', () => {
    for (const padState of ['winterized', 'repair', 'hold'] as const) {
      const player = createPlayer({ ...CONTEXT, padState });
      player.playUntil(1, 0, DEAD);
      expect(player.signals).toEqual([]);
    }
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    player.push({ kind: 'on-site', receivedAt: player.at, on: true });
    player.play(80 * MINUTE, DEAD);
    player.push({ kind: 'on-site', receivedAt: player.at, on: false });
    player.play(15 * MINUTE, DEAD);
    expect(player.signals).toEqual([]);

    player.play(10 * MINUTE, DEAD);
    expect(player.spoken()).toEqual(['stopped']);
  });

  it('ends a forgotten visit after ninety minutes', () => {
    const player = createPlayer();
    player.playUntil(0, 500, goodDay());
    player.push({ kind: 'on-site', receivedAt: player.at, on: true });
    player.play(115 * MINUTE, DEAD);

    expect(player.spoken()).toEqual(['stopped']);
  });
});
