import { describe, expect, it } from 'vitest';
import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import { resolveRules } from '#shared/domain/detectors/rule-settings.ts';
import { COARSE, clocks, createPlayer, DAY, HOUR, MINUTE, type Scene } from './pump-player.ts';

/**
 * The player's day by the model on k = 0.0095: some 66 gpm at 3450 rpm, so that 1700, 2850 and 2400 rpm through 14
 * hours move about 41,000 gallons.
 */
const POOL = { ...COARSE, poolGallons: 30_000, turnoversPerDay: 1 };

const goodDays = (context: PumpContext = POOL): ((at: number) => Scene) => {
  const closed = clocks(context);
  return (at) => ({ closedInputs: closed(at) });
};

describe('too-little-water', () => {
  it('raises when three whole days moved too little, names the short hours, and clears after a day with enough', () => {
    const short: PumpContext = { ...POOL, poolGallons: 55_000 };
    const player = createPlayer(short);
    player.play(4 * DAY - HOUR, goodDays(short));
    expect(player.raised('too-little-water')[0]).toMatchObject({
      alarmClass: 'note',
      priority: 'note',
      cause: 'short-hours',
      evidence: { turnovers: expect.closeTo(0.75, 0), target: 1, days: 3 },
    });
    expect(player.raised('too-little-water')[0]!.at - player.raised('too-little-water')[0]!.from).toBeLessThan(
      3 * DAY + HOUR,
    );

    const allDay = { ...short.settings.program[0]!, fromMinute: 0, toMinute: 1440, rpm: 2850 };
    const longer = { ...short, settings: { ...short.settings, inputs: [2850, 2850, null], program: [allDay] } };
    const closed = clocks(short);
    player.restart(longer);
    player.play(2 * DAY, (at) => {
      const mask = closed(at);
      const source = mask === 0 ? ('program' as const) : ('input' as const);
      return { closedInputs: mask, activeInput: mask === 3 ? 1 : mask, rpm: 2850, reportedSource: source };
    });
    expect(player.standing('too-little-water')).toBeUndefined();
  });

  it('names the low flow where a clean filter would have moved enough', () => {
    const player = createPlayer({ ...POOL, poolGallons: 42_000 });
    player.play(8 * DAY, goodDays());
    expect(player.spoken()).toEqual([]);
    const first = player.at;
    const closed = clocks(POOL);
    // Not so far down that it would be `low-load`.
    player.play(12 * DAY, (at) => ({
      closedInputs: closed(at),
      load: 1 - Math.min(0.05, ((at - first) / DAY) * 0.01),
    }));

    expect(player.standing('too-little-water')).toMatchObject({ cause: 'low-flow' });
    expect(player.spoken()).toEqual(['too-little-water']);
  });

  it('raises for a heater below its minimum flow for an hour on two days', () => {
    const heated: PumpContext = {
      ...POOL,
      equipment: [{ kind: 'heater', input: 2, minimumGpm: 58, interlock: 'flow-switch' }],
    };
    const player = createPlayer(heated);
    player.play(3 * DAY + HOUR, goodDays(heated));

    expect(player.raised('too-little-water')[0]).toMatchObject({
      cause: 'low-flow',
      evidence: { shortOfFlow: ['heater'] },
    });
  });

  it('leaves alone a heater that has enough, one that nobody calls for, and a cell that slow hours starve', () => {
    const content: PumpContext = {
      ...POOL,
      equipment: [
        { kind: 'heater', input: 2, minimumGpm: 30, interlock: 'flow-switch' },
        { kind: 'heater', minimumGpm: 200, interlock: 'flow-switch' },
        { kind: 'cell', minimumGpm: 45, interlock: 'flow-switch' },
      ],
    };
    const player = createPlayer(content);
    player.play(5 * DAY, goodDays(content));
    expect(player.signals).toEqual([]);
  });

  it('counts no day that was not seen whole, and says nothing without a pool, a target or a model', () => {
    const short: PumpContext = { ...POOL, poolGallons: 55_000 };
    const player = createPlayer(short);
    for (let day = 0; day < 6; day += 1) {
      player.playUntil(day, 1200, goodDays(short));
      player.silence(3 * HOUR);
      player.playUntil(day + 1, 0, goodDays(short));
    }
    expect(player.spoken()).not.toContain('too-little-water');

    for (const missing of ['poolGallons', 'turnoversPerDay', 'wetEnd'] as const) {
      const { [missing]: _, ...rest } = short;
      const without = createPlayer(rest);
      without.play(5 * DAY, goodDays(short));
      expect(without.signals).toEqual([]);
    }
  });

  it('leaves alone days that another alarm explains, a pad reduced for winter, and a target that is just met', () => {
    const player = createPlayer({ ...POOL, poolGallons: 41_000 });
    player.play(3 * DAY + 8 * HOUR, goodDays());
    player.play(12 * HOUR, { rpm: 0, watts: 6, reportedSource: 'stop' });
    player.play(3 * DAY, goodDays());
    expect(player.spoken()).toEqual(['stopped']);

    const reduced = createPlayer({ ...POOL, poolGallons: 60_000, padState: 'reduced' });
    reduced.play(5 * DAY, goodDays());
    expect(reduced.signals).toEqual([]);
  });

  it('judges as many days as somebody set', () => {
    const short: PumpContext = { ...POOL, poolGallons: 55_000 };
    const player = createPlayer(short);
    player.restart(short, resolveRules({ 'too-little-water': { figures: { days: 7 } } }));
    player.play(7 * DAY - HOUR, goodDays(short));
    expect(player.spoken()).toEqual([]);
    player.play(DAY, goodDays(short));
    expect(player.raised('too-little-water')[0]).toMatchObject({ cause: 'short-hours', evidence: { days: 7 } });
  });

  it('goes on after a restart', () => {
    const short: PumpContext = { ...POOL, poolGallons: 55_000 };
    const player = createPlayer(short);
    player.play(2 * DAY + 9 * HOUR, goodDays(short));
    player.restart();
    player.play(2 * DAY - 9 * HOUR + 10 * MINUTE, goodDays(short));
    expect(player.spoken()).toEqual(['too-little-water']);
  });
});
