import { describe, expect, it } from 'vitest';
import { createPlayer, goodDay, MINUTE, MONDAY } from './pump-player.ts';

describe('input-disagreement', () => {
  it('raises a minute after the ramp when the motor obeys an input that is open, names the leads, and clears', () => {
    const player = createPlayer();
    player.playUntil(0, 600, goodDay());
    player.play(10 * MINUTE, { closedInputs: 1, activeInput: 2, rpm: 2400 });
    const raised = player.raised('input-disagreement')[0]!;

    expect(raised).toMatchObject({ cause: 'swapped-leads', priority: 'soon', evidence: { input: 1, activeInput: 2 } });
    expect(raised.at - MONDAY - 600 * MINUTE).toBeLessThanOrEqual(100_000);
    expect(player.spoken()).toEqual(['input-disagreement']);

    player.play(5 * MINUTE, { closedInputs: 1 });
    expect(player.standing('input-disagreement')).toBeUndefined();
  });

  it('says unknown where the speed is not that of the input the motor names', () => {
    const player = createPlayer();
    player.playUntil(0, 600, goodDay());
    player.play(10 * MINUTE, { closedInputs: 1, activeInput: 2, rpm: 2850 });

    expect(player.standing('input-disagreement')?.cause).toBe('unknown');
  });

  it('stays silent in prime, between equal inputs, and for the second of two closed inputs', () => {
    const player = createPlayer();
    player.playUntil(0, 600, { closedInputs: 0 });
    player.play(30 * MINUTE, { closedInputs: 3, activeInput: 1 });
    player.play(30 * MINUTE, { closedInputs: 2 });
    player.play(10 * MINUTE, { rpm: 0, reportedSource: 'stop', closedInputs: 2, activeInput: 0 });
    player.play(170_000, { closedInputs: 1, activeInput: 2 });
    player.play(30 * MINUTE, { closedInputs: 1 });

    expect(player.signals).toEqual([]);
  });
});
