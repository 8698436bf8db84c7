import { describe, expect, it } from 'vitest';
import { CONTEXT, createPlayer, DAY, HOUR, MINUTE } from './pump-player.ts';

const volts = (mean: number) => (at: number) => ({ volts: mean + Math.sin(at / 17_000) * 2 });

describe('supply-voltage', () => {
  it('raises a standing voltage by its ten-minute mean, and clears inside the deadband', () => {
    const player = createPlayer();
    player.play(HOUR, volts(232));
    player.play(14 * MINUTE, volts(203));
    expect(player.raised('supply-voltage')[0]).toMatchObject({
      priority: 'note',
      cause: 'standing',
      evidence: { nominalVolts: 230 },
    });

    player.play(HOUR, volts(209));
    expect(player.standing('supply-voltage')).toBeDefined();
    player.play(HOUR, volts(228));
    expect(player.standing('supply-voltage')).toBeUndefined();
    expect(player.spoken()).toEqual(['supply-voltage']);
  });

  it('raises a sag below 85 % for half a minute', () => {
    const player = createPlayer();
    player.play(HOUR, volts(232));
    player.play(50_000, volts(188));
    expect(player.raised('supply-voltage')[0]).toMatchObject({ cause: 'sag' });
  });

  it('goes by what was measured over the first three days', () => {
    const player = createPlayer();
    player.play(3 * DAY + HOUR, volts(210));
    player.play(HOUR, volts(196));
    expect(player.signals.filter(({ detector }) => detector === 'supply-voltage')).toEqual([]);

    player.play(30 * MINUTE, volts(186));
    expect(player.raised('supply-voltage')[0]?.evidence.nominalVolts).toBeCloseTo(210, 0);
  });

  it('stays silent on a short dip, on ordinary swings, without a nominal, and where volts are not measured', () => {
    const player = createPlayer();
    player.play(HOUR, volts(232));
    player.play(20_000, volts(150));
    player.play(6 * HOUR, (at) => ({ volts: 230 + 18 * Math.sin(at / (2 * HOUR)) }));
    expect(player.signals).toEqual([]);

    const { nominalVolts: _, ...without } = CONTEXT;
    const unknown = createPlayer(without);
    unknown.play(HOUR, volts(190));
    expect(unknown.signals).toEqual([]);
  });
});
