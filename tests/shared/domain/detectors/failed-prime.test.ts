import { describe, expect, it } from 'vitest';
import { CONTEXT, createPlayer, goodDay, HOUR, MINUTE, MONDAY, SECOND } from './pump-player.ts';

const DRY = 0.35;
const START = MONDAY + 360 * MINUTE;

describe('failed-prime', () => {
  it('raises three minutes past the prime without load, from the start of that prime, and clears with load', () => {
    const player = createPlayer();
    player.playUntil(0, 360, {});
    player.play(8 * MINUTE, { load: DRY });
    const raised = player.raised('failed-prime')[0]!;

    expect(raised).toMatchObject({ priority: 'urgent', cause: 'air-leak', from: START });
    expect(raised.at).toBe(START + 6 * MINUTE);
    expect(raised).toHaveProperty('evidence.tries', 1);
    expect(player.fold.now()?.primed).toBe(false);

    player.play(5 * MINUTE, { load: 1 });
    expect(player.standing('failed-prime')).toBeUndefined();
    expect(player.spoken()).toEqual(['failed-prime']);
  });

  it('raises at the second try without load, from the first', () => {
    const player = createPlayer();
    player.playUntil(0, 360, {});
    const first = player.at;
    player.play(3 * MINUTE, { load: DRY });
    player.play(MINUTE, { rpm: 0, reportedSource: 'off' });
    expect(player.signals).toEqual([]);

    player.play(3 * MINUTE, { load: DRY });
    const raised = player.raised('failed-prime')[0]!;
    expect(raised).toMatchObject({ from: first, evidence: { tries: 2 } });

    player.play(10 * MINUTE, { rpm: 0, reportedSource: 'off' });
    expect(player.standing('failed-prime')).toBeDefined();
  });

  it('is judged at any speed after the prime, by learnt watts too', () => {
    const { wetEnd: _, ...learning } = CONTEXT;
    const player = createPlayer(learning);
    player.playUntil(3, 360, goodDay());
    player.play(8 * MINUTE, { load: DRY });

    expect(player.raised('failed-prime')[0]).toMatchObject({ evidence: { knownFrom: 'band' } });
  });

  it('is silent while nothing is known of the pump', () => {
    const { wetEnd: _, ...learning } = CONTEXT;
    const player = createPlayer(learning);
    player.playUntil(0, 360, {});
    player.play(20 * MINUTE, { load: DRY });

    expect(player.signals).toEqual([]);
    expect(player.fold.now()?.primed).toBeUndefined();
  });

  it.each([
    ['air-leak', () => 0.35],
    ['water-low', (since: number) => (since > 60 * SECOND && since < 100 * SECOND ? 1 : 0.3)],
    ['water-low', (since: number) => (since > 65 * SECOND && since < 110 * SECOND ? 0.75 : 0.3)],
    ['air-leak', (since: number) => 0.4 + 0.15 * Math.sin(since / 7000)],
    ['valve-shut', () => 0.56],
    ['blocked', () => 0.43],
  ])('ranks %s first', (cause, load) => {
    const player = createPlayer();
    player.playUntil(3, 360, goodDay());
    const start = player.at;
    player.play(8 * MINUTE, (at) => ({ load: load(at - start) }));

    expect(player.standing('failed-prime')?.cause).toBe(cause);
  });

  it('believes the fastest speed of the start: a slow pump draws nearly as much dry as wet', () => {
    const player = createPlayer();
    player.playUntil(3, 360, goodDay());
    const start = player.at;
    // Prime at 3450 rpm, then 1700 rpm, where drive and bearings take most of the watts.
    player.play(8 * MINUTE, (at) => ({ load: at - start < 180 * SECOND ? DRY : 0.55 }));

    expect(player.standing('failed-prime')).toMatchObject({
      cause: 'air-leak',
      evidence: { rpm: expect.closeTo(CONTEXT.settings.prime!.rpm, -2) },
    });
  });

  it('finds a shut valve behind a prime that a model took for load', () => {
    const { systemK: _, ...rough } = CONTEXT;
    const player = createPlayer(rough);
    player.playUntil(3, 360, goodDay());
    const start = player.at;
    player.play(12 * MINUTE, (at) => ({ load: at - start < 180 * SECOND ? 0.68 : 0.6 }));

    expect(player.spoken()).toEqual(['failed-prime']);
  });

  it('gives load that comes in the last moment its time', () => {
    const player = createPlayer();
    player.playUntil(0, 360, {});
    player.play(355 * SECOND, { load: DRY });
    player.playUntil(0, 600, goodDay());

    expect(player.signals).toEqual([]);
  });

  it('stays silent when priming is slow but comes, after a basket was cleaned, and where a try was cut short', () => {
    const player = createPlayer();
    player.playUntil(0, 360, {});
    player.play(150 * SECOND, { load: DRY });
    player.playUntil(0, 600, goodDay());
    player.play(5 * MINUTE, { rpm: 0, reportedSource: 'stop' });
    player.play(30 * SECOND, { load: DRY });
    player.play(2 * MINUTE, { rpm: 0, reportedSource: 'stop' });
    player.play(70 * SECOND, { load: DRY });
    player.playUntil(2, 0, goodDay());

    expect(player.signals).toEqual([]);
  });

  it('holds back what it explains', () => {
    const player = createPlayer();
    player.playUntil(0, 360, {});
    player.play(HOUR, { load: DRY, rpm: 3450, reportedSource: 'program' });

    expect(player.spoken()).toEqual(['failed-prime']);
  });
});
