import { describe, expect, it } from 'vitest';
import type { Equipment } from '#shared/domain/control/pump-context.ts';
import { CONTEXT, createPlayer, goodDay, MINUTE } from './pump-player.ts';

const withEquipment = (...equipment: Equipment[]) => ({ ...CONTEXT, equipment });
const HEATER: Equipment = { kind: 'heater', input: 1, interlock: 'none' };
const STOPPED = { closedInputs: 1, activeInput: 0, rpm: 0, watts: 4, reportedSource: 'stop' as const };

describe('energized-without-flow', () => {
  it.each(['heater', 'cell', 'feeder'] as const)(
    'raises after three minutes for a %s, explains the rest, and clears',
    (kind) => {
      const player = createPlayer(withEquipment({ kind, input: 1, interlock: 'none' }));
      player.playUntil(0, 600, goodDay());
      const onset = player.at;
      player.play(200 * MINUTE, STOPPED);
      const raised = player.raised('energized-without-flow')[0]!;

      expect(raised).toMatchObject({ priority: 'urgent', cause: kind, from: onset });
      expect(raised.at).toBe(onset + 3 * MINUTE);
      expect(player.spoken()).toEqual(['energized-without-flow']);

      player.play(8 * MINUTE, { closedInputs: 1 });
      expect(player.standing('energized-without-flow')).toBeUndefined();
    },
  );

  it('raises for a pump that turns without load', () => {
    const player = createPlayer(withEquipment(HEATER));
    player.playUntil(0, 400, {});
    player.play(5 * MINUTE, { closedInputs: 1, load: 0.35 });
    expect(player.spoken()).toEqual(['energized-without-flow']);
  });

  it('leaves an alarm that spoke before it standing, and does not have it raised twice', () => {
    const player = createPlayer(withEquipment({ ...HEATER, input: 2 }));
    player.playUntil(0, 600, goodDay());
    player.play(60 * MINUTE, { rpm: 0, watts: 4 });
    player.play(30 * MINUTE, { closedInputs: 2, activeInput: 0, rpm: 0, watts: 4 });
    player.play(60 * MINUTE, { rpm: 0, watts: 4 });
    expect(player.raised('stopped')).toHaveLength(1);
    expect(player.raised('energized-without-flow')).toHaveLength(1);
    expect(player.standing('stopped')).toBeDefined();
  });

  it('is heard while we are on site and on a pad under repair', () => {
    const player = createPlayer({ ...withEquipment(HEATER), padState: 'repair' });
    player.playUntil(0, 600, goodDay());
    player.push({ kind: 'on-site', receivedAt: player.at, on: true });
    player.play(5 * MINUTE, STOPPED);
    expect(player.spoken()).toEqual(['energized-without-flow']);
  });

  it.each([
    ['an interlock of its own', { ...HEATER, interlock: 'flow-switch' as const }],
    ['an interlock nobody recorded', { ...HEATER, interlock: 'unknown' as const }],
    ['another input', { ...HEATER, input: 2 }],
    ['no clock of its own', { kind: 'heater' as const, interlock: 'none' as const }],
    ['nothing to overheat', { kind: 'booster' as const, input: 1, interlock: 'none' as const }],
  ])('stays silent for equipment with %s', (_, equipment) => {
    const player = createPlayer(withEquipment(equipment));
    player.playUntil(0, 600, goodDay());
    player.play(18 * MINUTE, STOPPED);
    expect(player.signals).toEqual([]);
  });

  it('stays silent through an ordinary prime with the input closed', () => {
    const player = createPlayer(withEquipment(HEATER));
    player.playUntil(0, 355, {});
    player.play(100_000, { closedInputs: 1, load: 0.35 });
    player.playUntil(2, 0, goodDay());
    expect(player.signals).toEqual([]);
  });
});
