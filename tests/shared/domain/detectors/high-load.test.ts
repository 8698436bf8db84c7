import { describe, expect, it } from 'vitest';
import { COARSE, CONTEXT, clocks, createPlayer, DAY, goodDay, HOUR, MINUTE } from './pump-player.ts';

function learnt(context = CONTEXT) {
  const player = createPlayer(context);
  player.playUntil(3, 610, goodDay(context));
  return player;
}

/** Pipes so narrow that an open bypass shows in the watts. */
const NARROW = { ...CONTEXT, systemK: 0.05 };

describe('high-load', () => {
  it('raises after two hours in one stretch a sixth over the usual watts, and clears', () => {
    const player = learnt();
    const onset = player.at;
    player.play(118 * MINUTE, { closedInputs: 1, load: 1.2 });
    expect(player.signals).toEqual([]);
    player.play(5 * MINUTE, { closedInputs: 1, load: 1.2 });
    const [raised] = player.raised('high-load');

    expect(raised).toMatchObject({ alarmClass: 'alarm', priority: 'soon' });
    expect(raised!.from - onset).toBeLessThanOrEqual(MINUTE);
    expect(raised!.evidence).toMatchObject({ rise: expect.closeTo(0.2, 1) });

    player.play(15 * MINUTE, { closedInputs: 1 });
    expect(player.standing('high-load')).toBeUndefined();
    expect(player.spoken()).toEqual(['high-load']);
  });

  it('raises after twenty minutes a third over, and names the way to waste', () => {
    const player = learnt();
    player.play(19 * MINUTE, { closedInputs: 1, load: 1.36 });
    expect(player.signals).toEqual([]);
    player.play(4 * MINUTE, { closedInputs: 1, load: 1.36 });

    expect(player.raised('high-load')[0]).toMatchObject({ cause: 'to-waste' });
  });

  it('names what rubs where no flow could take so much', () => {
    const player = learnt();
    player.play(2.2 * HOUR, { closedInputs: 1, load: 1.24 });
    expect(player.raised('high-load')[0]).toMatchObject({ cause: 'rubbing' });
  });

  it('names a bypass where the load came at once and a wider way explains it', () => {
    const player = learnt(NARROW);
    player.play(2.2 * HOUR, { closedInputs: 1, load: 1.2 });
    expect(player.raised('high-load')[0]).toMatchObject({ cause: 'bypass' });
  });

  it('names what rubs where the load came on over two hours, or weighs more at low speed', () => {
    const creeping = learnt(NARROW);
    const onset = creeping.at;
    creeping.play(3.8 * HOUR, (at) => ({ closedInputs: 1, load: 1 + Math.min(0.22, ((at - onset) / HOUR) * 0.1) }));
    expect(creeping.raised('high-load')[0]).toMatchObject({ cause: 'rubbing' });

    const slower = createPlayer(NARROW);
    slower.playUntil(3, 780, goodDay(NARROW));
    slower.play(40 * MINUTE, { closedInputs: 1, load: 1.17 });
    slower.play(2 * HOUR, { load: 1.28 });
    expect(slower.standing('high-load')).toMatchObject({ cause: 'rubbing' });
  });

  it('stays silent on a backwash, on a vacuum to waste that somebody runs by hand, and on a clean filter', () => {
    const player = learnt();
    player.play(12 * MINUTE, { closedInputs: 1, load: 1.38 });
    player.play(HOUR, { closedInputs: 1 });
    player.playUntil(3, 850, goodDay());
    player.play(50 * MINUTE, { rpm: 2850, reportedSource: 'keypad', load: 1.4 });
    expect(player.signals).toEqual([]);

    const cleaned = createPlayer(COARSE);
    const closed = clocks(COARSE);
    const days = (load: (day: number) => number, count: number): void => {
      const first = cleaned.at;
      cleaned.play(count * DAY, (at) => ({ closedInputs: closed(at), load: load((at - first) / DAY) }));
    };
    days(() => 1, 7);
    days((day) => 1 - Math.min(0.12, day * 0.012), 20);
    days(() => 1.02, 3);
    expect(cleaned.spoken()).not.toContain('high-load');
  });

  it('does not add up two stretches, and stays silent while it is learning', () => {
    const player = learnt();
    player.play(90 * MINUTE, { closedInputs: 1, load: 1.2 });
    player.playUntil(4, 610, goodDay());
    player.play(90 * MINUTE, { closedInputs: 1, load: 1.2 });
    expect(player.signals).toEqual([]);

    const fresh = createPlayer();
    fresh.playUntil(0, 600, goodDay());
    fresh.play(3 * HOUR, { closedInputs: 1, load: 1.25 });
    expect(fresh.signals).toEqual([]);
  });
});
