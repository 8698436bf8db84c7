import { describe, expect, it } from 'vitest';
import { COARSE, CONTEXT, clocks, createPlayer, DAY, goodDay, HOUR, MINUTE, type Scene } from './pump-player.ts';

/** A pump that has run for three days and stands at eleven in the morning, on its first input. */
function learnt(context = CONTEXT) {
  const player = createPlayer(context);
  player.playUntil(3, 660, goodDay(context));
  return player;
}

/** Days of a good pump whose load is what `load` says of the day. */
const dayByDay = (load: (day: number) => number): ((at: number) => Scene) => {
  const closed = clocks(COARSE);
  let first = 0;
  return (at) => {
    if (first === 0) first = at;
    return { closedInputs: closed(at), load: load(Math.floor((at - first) / DAY)) };
  };
};

describe('low-load, sudden', () => {
  it('raises after half an hour a fifth under the usual watts, and clears', () => {
    const player = learnt();
    const onset = player.at;
    player.play(29 * MINUTE, { closedInputs: 1, load: 0.76 });
    expect(player.signals).toEqual([]);
    player.play(3 * MINUTE, { closedInputs: 1, load: 0.76 });
    const [raised] = player.raised('low-load');

    expect(raised).toMatchObject({ alarmClass: 'alarm', priority: 'soon', cause: 'sudden' });
    expect(raised!.from - onset).toBeLessThanOrEqual(90_000);
    expect(raised!.at - onset).toBeLessThanOrEqual(32 * MINUTE);
    expect(raised!.evidence).toMatchObject({ drop: expect.closeTo(0.24, 1), usualWatts: expect.any(Number) });

    player.play(20 * MINUTE, { closedInputs: 1 });
    expect(player.standing('low-load')).toBeUndefined();
    expect(player.spoken()).toEqual(['low-load']);
  });

  it('stays one alarm for days, though a slower speed shows less of it', () => {
    const player = learnt();
    const closed = clocks();
    player.playUntil(5, 1100, (at) => ({ closedInputs: closed(at), load: closed(at) === 0 ? 0.87 : 0.75 }));

    expect(player.raised('low-load')).toHaveLength(1);
    expect(player.standing('low-load')).toMatchObject({ cause: 'sudden' });
  });

  it('stays silent while the basket is cleaned, on a backwash, and on a vacuum that somebody runs by hand', () => {
    const player = learnt();
    player.play(6 * MINUTE, { closedInputs: 1, rpm: 0, reportedSource: 'stop', watts: 6 });
    player.play(20 * MINUTE, { closedInputs: 1 });
    player.play(12 * MINUTE, { closedInputs: 1, load: 0.75 });
    player.play(20 * MINUTE, { closedInputs: 1 });
    player.playUntil(3, 870, { closedInputs: 1 });
    player.play(50 * MINUTE, { rpm: 2850, reportedSource: 'keypad', load: 0.74 });
    player.play(HOUR, goodDay());

    expect(player.signals).toEqual([]);
  });

  it('knows the pipes of the sun from those of the pool', () => {
    const solar = {
      ...CONTEXT,
      inputs: [
        ...CONTEXT.inputs,
        { number: 3, kind: 'solar-controller' as const, windows: [], drives: 'solar' as const },
      ],
    };
    const player = createPlayer(solar);
    for (let day = 0; day < 4; day += 1) {
      player.playUntil(day, 660, goodDay());
      player.playUntil(day, 760, { closedInputs: 0b101, load: 0.76 });
      player.playUntil(day + 1, 0, goodDay());
    }

    expect(player.signals).toEqual([]);
  });

  it('stays silent while it is learning, on somebody’s visit, and where the pad is winterized', () => {
    const fresh = createPlayer();
    fresh.playUntil(0, 700, goodDay());
    fresh.play(HOUR, { closedInputs: 1, load: 0.76 });
    expect(fresh.spoken()).not.toContain('low-load');

    const visited = learnt();
    visited.push({ kind: 'on-site', receivedAt: visited.at, on: true });
    visited.play(50 * MINUTE, { closedInputs: 1, load: 0.76 });
    expect(visited.signals).toEqual([]);

    const winter = learnt();
    winter.push({ kind: 'pad-state', receivedAt: winter.at, state: 'winterized' });
    winter.play(50 * MINUTE, { closedInputs: 1, load: 0.76 });
    expect(winter.spoken()).not.toContain('low-load');
  });

  it('goes on after a restart', () => {
    const player = learnt();
    player.play(20 * MINUTE, { closedInputs: 1, load: 0.76 });
    player.restart();
    player.play(12 * MINUTE, { closedInputs: 1, load: 0.76 });
    expect(player.spoken()).toEqual(['low-load']);
  });
});

describe('low-load, slow', () => {
  it('notes three days of flow down by a third, makes it an alarm as it goes on, and clears once cleaned', () => {
    const player = createPlayer(COARSE);
    player.play(
      8 * DAY,
      dayByDay(() => 1),
    );
    player.play(
      10 * DAY,
      dayByDay((day) => 1 - 0.017 * day),
    );
    const [raised] = player.raised('low-load');

    expect(raised).toMatchObject({ alarmClass: 'note', priority: 'note', cause: 'slow' });
    expect(raised!.evidence.flowDrop).toBeGreaterThanOrEqual(0.3);

    player.play(
      4 * DAY,
      dayByDay(() => 0.8),
    );
    expect(player.standing('low-load')).toMatchObject({ alarmClass: 'alarm', priority: 'soon', cause: 'slow' });
    expect(player.raised('low-load')).toHaveLength(1);

    player.play(
      2 * DAY,
      dayByDay(() => 1),
    );
    expect(player.standing('low-load')).toBeUndefined();
    expect(player.spoken()).toEqual(['low-load']);
  });

  it('names a lesser fall that came from one day to the next sudden, once it has lasted', () => {
    const player = createPlayer(COARSE);
    player.play(
      8 * DAY,
      dayByDay(() => 1),
    );
    player.play(
      4 * DAY,
      dayByDay(() => 0.84),
    );

    expect(player.standing('low-load')).toMatchObject({ cause: 'sudden' });
  });

  it('goes by the watts alone where no model tells the flow', () => {
    const { wetEnd: _, ...unknown } = COARSE;
    const player = createPlayer(unknown);
    player.play(
      8 * DAY,
      dayByDay(() => 1),
    );
    player.play(
      11 * DAY,
      dayByDay((day) => 1 - 0.02 * day),
    );
    expect(player.raised('low-load')[0]).toMatchObject({ alarmClass: 'note', cause: 'slow' });
    expect(player.raised('low-load')[0]!.evidence.flowDrop).toBeNull();

    player.play(
      2 * DAY,
      dayByDay(() => 1),
    );
    expect(player.standing('low-load')).toBeUndefined();
    expect(player.spoken()).toEqual(['low-load']);
  });

  it('stays silent on an ordinary filter, fouled by a few per cent a week and cleaned, and on a pump without a model', () => {
    const player = createPlayer(COARSE);
    for (let round = 0; round < 2; round += 1)
      player.play(
        12 * DAY,
        dayByDay((day) => 1 - 0.006 * day),
      );
    expect(player.signals).toEqual([]);

    const { wetEnd: _, ...unknown } = COARSE;
    const plain = createPlayer(unknown);
    plain.play(
      8 * DAY,
      dayByDay(() => 1),
    );
    plain.play(
      6 * DAY,
      dayByDay((day) => 1 - 0.02 * day),
    );
    expect(plain.signals).toEqual([]);
  });
});
