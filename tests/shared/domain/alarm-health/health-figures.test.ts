import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { AlarmLife } from '#shared/domain/alarm-health/alarm-life.ts';
import { countPeriods } from '#shared/domain/alarm-health/count-periods.ts';
import { healthFigures } from '#shared/domain/alarm-health/health-figures.ts';
import { judgeHealth } from '#shared/domain/alarm-health/judge-health.ts';
import { readLife } from '#shared/domain/alarm-health/read-life.ts';
import { localDays } from '#shared/domain/time/local-days.ts';
import { DAY, HOUR, lifeOf, livesAt, MINUTE } from './sample-lives.ts';

const measure = (lives: readonly AlarmLife[], until = 30 * DAY) =>
  healthFigures(lives.map(readLife), { from: 0, until, days: localDays('UTC', 0, until) });
const verdictOf = (lives: readonly AlarmLife[], metric: string, until?: number) =>
  judgeHealth(measure(lives, until)).find((each) => each.metric === metric)?.verdict;
const evenly = (count: number, until: number) => Array.from({ length: count }, (_, index) => (index * until) / count);

/*
 * Targets: ANSI/ISA-18.2-2016 § 16.4 as quoted in a public repository, EEMUA 191's digest for the flood (facts, section
 * 5). Per day by times 24: computed.
 */
describe('the rate', () => {
  it('of 6 an hour, 144 a day, is acceptable; of 12, 288 a day, the most; above it too much', () => {
    const at = (perDay: number) => livesAt(evenly(perDay * 2, 2 * DAY));
    expect(measure(at(144), 2 * DAY)).toMatchObject({ perDay: 144, perHour: 6, perTenMinutes: 1 });
    expect(verdictOf(at(144), 'rate', 2 * DAY)).toBe('within');
    expect(verdictOf(at(145), 'rate', 2 * DAY)).toBe('most');
    expect(verdictOf(at(288), 'rate', 2 * DAY)).toBe('most');
    expect(verdictOf(at(289), 'rate', 2 * DAY)).toBe('over');
  });

  it('is counted by local day, on the day of 25 hours too', () => {
    const from = Date.UTC(2026, 9, 31, 7);
    const days = localDays('America/Los_Angeles', from, from + 3 * DAY);
    const lives = livesAt([from, from + 25 * HOUR, from + 48 * HOUR]);
    const { byDay } = healthFigures(lives.map(readLife), { from, until: from + 3 * DAY, days });
    expect(byDay.map(({ soon }) => soon)).toEqual([1, 2, 0]);
  });
});

describe('peaks and floods', () => {
  it('calls a period a peak above 10, and too many at 1 % of all periods', () => {
    const burst = (count: number, at: number) => Array.from({ length: count }, (_, index) => at + index);
    expect(countPeriods(burst(10, 0), 0, DAY)).toMatchObject({ periods: 144, most: 10, above: 0, floods: [] });
    expect(countPeriods(burst(11, HOUR), 0, DAY)).toMatchObject({ most: 11, mostAt: HOUR, above: 1 });
    expect(verdictOf(livesAt(burst(10, 0)), 'peak')).toBe('within');
    // One period of 4,320 is under 1 %, but no period may have more than 10.
    expect(verdictOf(livesAt(burst(11, 0)), 'peak')).toBe('over');
  });

  it('begins a flood above 10 and ends it below 5', () => {
    const counts = [0, 11, 6, 5, 4, 11, 12, 0];
    const instants = counts.flatMap((count, period) =>
      Array.from({ length: count }, (_, index) => period * 10 * MINUTE + index),
    );
    const { floods, floodPeriods } = countPeriods(instants, 0, 80 * MINUTE);
    expect(floods).toEqual([
      { from: 10 * MINUTE, to: 40 * MINUTE, count: 22, most: 11 },
      { from: 50 * MINUTE, to: 70 * MINUTE, count: 23, most: 12 },
    ]);
    expect(floodPeriods).toBe(5);
  });

  it('counts every alarm of the stretch in one period, whatever the order', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: -HOUR, max: 3 * HOUR })), (instants) => {
        const inside = instants.filter((at) => at >= 0 && at < 2 * HOUR);
        const counted = countPeriods(instants, 0, 2 * HOUR);
        expect(counted).toEqual(countPeriods(instants.toReversed(), 0, 2 * HOUR));
        const slots = Array.from(
          { length: 12 },
          (_, slot) => inside.filter((at) => Math.floor(at / (10 * MINUTE)) === slot).length,
        );
        expect(counted.most).toBe(Math.max(...slots));
        expect(counted.above).toBe(slots.filter((count) => count > 10).length);
      }),
    );
  });
});

describe('what repeats', () => {
  it('ranks pump and detector together, and takes the share of the first ten', () => {
    const noisy = livesAt(evenly(30, DAY), { pumpId: 'noisy' });
    const { topTen, topTenShare } = measure([...noisy, ...livesAt(evenly(20, DAY))]);
    expect(topTen[0]).toMatchObject({ pumpId: 'noisy', detector: 'wrong-speed', count: 30 });
    expect(topTen).toHaveLength(10);
    expect(topTenShare).toBe(39 / 50);
  });

  it('judges the share of the first ten from 200 alarms on: below, no ten could be under 5 %', () => {
    expect(verdictOf(livesAt(evenly(199, DAY)), 'top-ten')).toBe('few');
    expect(verdictOf(livesAt(evenly(200, DAY)), 'top-ten')).toBe('within');
    const twice = [...livesAt(evenly(199, DAY)), ...livesAt([1, 2, 3], { pumpId: 'one' })];
    expect(verdictOf(twice, 'top-ten')).toBe('over');
  });

  it('calls three returns within a minute chattering, at one pump, over all its alarms', () => {
    const returns = (times: readonly number[], pumpId: string) =>
      times.map((at) =>
        lifeOf(
          [
            ['raised', at - 5_000],
            ['returned', at],
          ],
          { pumpId },
        ),
      );
    const chatters = returns([10_000, 30_000, 70_000], 'chatters');
    expect(measure(chatters).chattering).toMatchObject([{ pumpId: 'chatters', count: 1 }]);
    expect(verdictOf(chatters, 'chattering')).toBe('over');
    expect(measure(returns([10_000, 30_000, 70_001], 'slower')).chattering).toEqual([]);
    expect(measure([...returns([10_000, 30_000], 'one'), ...returns([50_000], 'other')]).chattering).toEqual([]);
  });

  it('calls an alarm that is over within 10 s fleeting', () => {
    const lasting = (ms: number) =>
      lifeOf([
        ['raised', 0],
        ['returned', ms],
      ]);
    expect(measure([lasting(9_999)]).fleeting).toHaveLength(1);
    expect(measure([lasting(10_000)]).fleeting).toEqual([]);
  });
});

describe('stale alarms', () => {
  const standing = (from: number, to?: number) =>
    lifeOf([['raised', from], ...(to === undefined ? [] : ([['returned', to]] as const))]);

  it('have stood for over 24 h; fewer than 5 on any day are allowed', () => {
    expect(measure([standing(0, DAY)]).stale).toEqual({ now: [], most: 0, mostOn: null });
    const four = Array.from({ length: 4 }, () => standing(2 * DAY, 4 * DAY));
    expect(measure(four).stale).toMatchObject({ most: 4, mostOn: 3 * DAY, now: [] });
    expect(verdictOf(four, 'stale')).toBe('within');
    expect(verdictOf([...four, standing(3 * DAY - HOUR)], 'stale')).toBe('over');
  });

  it('are named while they stand, the oldest first', () => {
    const { now } = measure([standing(28.5 * DAY), standing(20 * DAY), standing(29.5 * DAY)]).stale;
    expect(now.map(({ since }) => since)).toEqual([20 * DAY, 28.5 * DAY]);
  });
});

describe('priorities', () => {
  const mixed = (urgent: number, soon: number, note: number) =>
    [
      ...Array<'urgent'>(urgent).fill('urgent'),
      ...Array<'soon'>(soon).fill('soon'),
      ...Array<'note'>(note).fill('note'),
    ].map((priority, index) => lifeOf([['raised', index * HOUR, { priority }]], { detector: 'stopped' }));

  it('fit at 80 / 15 / 5 and not with twice as many urgent ones', () => {
    expect(measure(mixed(5, 15, 80)).priorities).toEqual({ urgent: 5, soon: 15, note: 80 });
    expect(verdictOf(mixed(5, 15, 80), 'priorities')).toBe('within');
    expect(verdictOf(mixed(10, 15, 75), 'priorities')).toBe('over');
    expect(verdictOf(mixed(0, 10, 90), 'priorities')).toBe('within');
  });

  it('are not judged while one alarm is more than the share aimed at', () => {
    expect(verdictOf(mixed(1, 0, 18), 'priorities')).toBe('few');
  });
});

describe('acknowledging', () => {
  it('is timed by priority against our own limits, 15 min and 4 h', () => {
    const seenAfter = (minutes: number) =>
      lifeOf([
        ['raised', 0, { priority: 'urgent' }],
        ['acknowledged', minutes * MINUTE, { priority: 'urgent', by: 'tess' }],
      ]);
    const [urgent, soon, note] = measure([5, 15, 16, 40].map(seenAfter)).acknowledging;
    expect(urgent).toMatchObject({
      count: 4,
      medianMs: 15 * MINUTE,
      slowMs: 40 * MINUTE,
      limitMs: 15 * MINUTE,
      inTime: 2,
      waiting: 0,
    });
    expect(soon).toMatchObject({ count: 0, medianMs: null, limitMs: 4 * HOUR });
    expect(note).toMatchObject({ limitMs: null, inTime: null });
  });

  it('leaves out of the times what nobody has seen, and says how many', () => {
    const [, soon] = measure([lifeOf([['raised', 0]])]).acknowledging;
    expect(soon).toMatchObject({ count: 1, acknowledged: 0, waiting: 1, medianMs: null });
  });
});

it('counts what was set aside, and finds nothing wrong with a fleet without alarms', () => {
  const held = lifeOf([
    ['raised', 0],
    ['shelved', 1, { by: 'tess' }],
  ]);
  expect(measure([held]).aside).toEqual({
    shelved: { begun: 1, now: 1 },
    suppressed: { begun: 0, now: 0 },
    outOfService: { begun: 0, now: 0 },
    unexplained: 1,
  });
  const verdicts = judgeHealth(measure([])).map(({ verdict }) => verdict);
  expect(new Set(verdicts)).toEqual(new Set(['within', 'few']));
});
