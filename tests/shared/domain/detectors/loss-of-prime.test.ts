import { describe, expect, it } from 'vitest';
import { CONTEXT, createPlayer, createRandom, goodDay, HOUR, MINUTE } from './pump-player.ts';

function learnt(context = CONTEXT) {
  const player = createPlayer(context);
  player.playUntil(3, 660, goodDay(context));
  return player;
}

describe('loss-of-prime', () => {
  it('raises three minutes after the load is gone above 2400 rpm, names it sudden, and clears', () => {
    const player = learnt();
    const onset = player.at;
    player.play(6 * MINUTE, { closedInputs: 1, load: 0.36 });
    const raised = player.raised('loss-of-prime')[0]!;

    expect(raised).toMatchObject({ priority: 'urgent', cause: 'sudden' });
    expect(raised.from - onset).toBeLessThanOrEqual(60_000);
    expect(raised.at - raised.from).toBeLessThanOrEqual(3 * MINUTE + 10_000);

    player.play(6 * MINUTE, { closedInputs: 1 });
    expect(player.standing('loss-of-prime')).toBeUndefined();
    expect(player.spoken()).toEqual(['loss-of-prime']);
  });

  it('keeps the cause that it had while the water was gone, and says nothing of a gulp that ended in time', () => {
    const player = learnt();
    player.play(2 * MINUTE + 20_000, { closedInputs: 1, load: 0.36 });
    player.play(30 * MINUTE, { closedInputs: 1 });
    expect(player.signals).toEqual([]);

    player.play(20 * MINUTE, { closedInputs: 1, load: 0.36 });
    player.play(10 * MINUTE, { closedInputs: 1 });
    const causes = player.signals.flatMap((signal) => ('cause' in signal ? [signal.cause] : []));
    expect(new Set(causes)).toEqual(new Set(['sudden']));
    expect(player.standing('loss-of-prime')).toBeUndefined();
  });

  it('is no failed prime hours after a good one, however the load comes and goes', () => {
    const player = createPlayer();
    player.playUntil(3, 660, goodDay());
    const start = player.at;
    player.play(40 * MINUTE, (at) => ({ closedInputs: 1, load: ((at - start) / 60_000) % 1 < 0.5 ? 0.35 : 1 }));

    expect(player.raised('failed-prime')).toEqual([]);
  });

  it('gives a slow pump ten minutes and judges none below 1500 rpm', () => {
    const player = createPlayer();
    player.playUntil(3, 500, goodDay());
    player.play(9 * MINUTE, { load: 0.36 });
    expect(player.signals).toEqual([]);
    player.play(3 * MINUTE, { load: 0.36 });
    expect(player.spoken()).toEqual(['loss-of-prime']);

    const slow = {
      ...CONTEXT,
      settings: { ...CONTEXT.settings, program: [{ ...CONTEXT.settings.program[0]!, rpm: 1300 }] },
    };
    const gentle = createPlayer(slow);
    gentle.playUntil(3, 500, goodDay(slow));
    gentle.play(HOUR, { load: 0.36 });
    // What the watts cannot tell from air is said as what they do tell: less load.
    expect(gentle.spoken()).toEqual(['low-load']);
  });

  it('hears a pump that gulps air', () => {
    const player = learnt();
    const random = createRandom(3);
    player.play(12 * MINUTE, () => ({ closedInputs: 1, load: 0.6 + random() * 0.5 }));
    expect(player.raised('loss-of-prime')[0]).toMatchObject({ cause: 'ragged' });
  });

  it('stays silent where air belongs: spa jets and features', () => {
    const spa = {
      ...CONTEXT,
      inputs: CONTEXT.inputs.map((input) => (input.number === 1 ? { ...input, drives: 'spa' as const } : input)),
    };
    const player = learnt(spa);
    const random = createRandom(3);
    player.play(20 * MINUTE, () => ({ closedInputs: 1, load: 0.6 + random() * 0.5 }));
    expect(player.signals).toEqual([]);
  });

  it('stays silent on a plugged basket, a backwash, five per cent of noise, and before it knows the pump', () => {
    const player = learnt();
    const random = createRandom(5);
    player.play(20 * MINUTE, { closedInputs: 1, load: 0.78 });
    player.play(20 * MINUTE, { closedInputs: 1, load: 1.2 });
    player.play(20 * MINUTE, () => ({ closedInputs: 1, load: 0.9 + 0.2 * random() }));
    expect(player.signals).toEqual([]);

    const { wetEnd: _, ...unknown } = CONTEXT;
    const fresh = createPlayer(unknown);
    fresh.playUntil(0, 620, goodDay());
    fresh.play(20 * MINUTE, { closedInputs: 1, load: 0.4 });
    expect(fresh.signals).toEqual([]);
  });
});
