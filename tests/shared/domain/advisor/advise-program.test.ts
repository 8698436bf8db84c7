import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { AdviceRequest } from '#shared/domain/advisor/advice-request.ts';
import { adviseProgram } from '#shared/domain/advisor/advise-program.ts';
import { mostSavedShare } from '#shared/domain/advisor/most-saved-share.ts';
import type { NeedKind } from '#shared/domain/advisor/pad-needs.ts';
import { TWO_TIER } from '#tests/shared/domain/energy/sample-tariffs.ts';
import { EVERY_DAY, REQUEST, WEEKEND } from './sample-request.ts';

/** One price and a coarse keypad, so that a week has one kind of day and the answer is quick. */
const plain: AdviceRequest = { ...REQUEST, tariff: TWO_TIER, speedStepRpm: 150 };

function adviceOf(request: AdviceRequest) {
  const advice = adviseProgram(request);
  if (advice.kind !== 'advice' && advice.kind !== 'keep') throw new Error(JSON.stringify(advice));
  return advice;
}
function unmetOf(request: AdviceRequest) {
  const advice = adviseProgram(request);
  return advice.kind === 'infeasible' ? advice.unmet : advice.kind;
}
const needs = (change: Partial<AdviceRequest['needs']>) => ({ ...REQUEST.needs, ...change });
const window = (kind: NeedKind, from: number, to: number, ask: object) => ({
  kind,
  days: EVERY_DAY,
  fromMinute: from * 60,
  toMinute: to * 60,
  ...ask,
});

describe('advised program', () => {
  it('moves the same water slowly in cheap hours for less than half the money', () => {
    const advice = adviceOf(REQUEST);

    expect(advice.kind).toBe('advice');
    expect(advice.savedShare).toBeGreaterThan(0.5);
    expect(advice.after.shortfalls).toEqual([]);
    expect(advice.after.program.length).toBeLessThanOrEqual(3);
    expect(Math.min(...advice.after.gallonsByWeekday)).toBeGreaterThanOrEqual(20_000 - 1e-6);
    expect(advice.after.minorUnitsPerMonth).toBeLessThan(advice.before.minorUnitsPerMonth / 2);
    expect(Number.isInteger(advice.after.minorUnitsPerMonth)).toBe(true);
  });

  it('turns slowest in the dear hours of weekdays', () => {
    const { week } = adviceOf(REQUEST).after;
    const isDear = ({ from }: { readonly from: number }): boolean => {
      const hour = (from / 3_600_000) % 24;
      return hour >= 16 && hour < 21 && Math.floor(from / 86_400_000) - 4 < 5;
    };
    const dear = week.filter((run) => isDear(run)).map(({ rpm }) => rpm);

    expect(Math.max(0, ...dear)).toBeLessThanOrEqual(REQUEST.settings.minRpm);
    expect(Math.max(...week.filter(({ source }) => source === 'program').map(({ rpm }) => rpm))).toBeGreaterThan(
      REQUEST.settings.minRpm,
    );
  });

  it('reckons the present program by hand: 56 hours a week at full speed, primes at full speed too', () => {
    const { before } = adviceOf(plain);
    const watts = before.kwhPerWeek * 1000 - 8 * (168 - 56);

    // Duty at 3450 rpm on k 0.0125: 0.017·Q² + 0.05·Q = 84.
    const gpm = (-0.05 + Math.sqrt(0.05 ** 2 + 4 * 0.017 * 84)) / (2 * 0.017);
    expect(watts / 56).toBeCloseTo(8 + 950 + 12 * gpm - 0.03 * gpm ** 2, 3);
    expect(before.gallonsByWeekday[0]).toBeCloseTo(gpm * 480, 3);
    expect(before.microsPerWeek).toBeCloseTo(before.kwhPerWeek * 100_000, 3);
  });

  it('costs no less than the relaxation, and little more where one price rules', () => {
    const advice = adviceOf({ ...plain, settings: { ...plain.settings, prime: null } });
    const added = advice.after.microsPerWeek - 168 * 0.008 * 100_000;

    expect(added).toBeGreaterThanOrEqual(advice.leastMicrosPerWeek - 1e-6);
    expect(added).toBeLessThan(advice.leastMicrosPerWeek * 1.03);
    expect(advice.proved).toBe(true);
  });

  it('counts what a clock’s input moves anyway, and leaves its hours alone', () => {
    const clock = { input: 1, window: { days: EVERY_DAY, onMinute: 600, offMinute: 780, opensEarlyMinutes: 0 } };
    const [with1, without] = [adviceOf({ ...plain, windows: [clock] }), adviceOf(plain)];

    expect(with1.after.week.some(({ source, rpm }) => source === 'input' && rpm === 2850)).toBe(true);
    expect(with1.after.shortfalls).toEqual([]);
    expect(with1.leastMicrosPerWeek).toBeLessThan(without.leastMicrosPerWeek);
  });

  it('covers the booster with half an hour on each side', () => {
    const advice = adviceOf({ ...plain, needs: needs({ windows: [window('booster', 10, 12, { minimumRpm: 2400 })] }) });
    const fast = advice.after.program.filter(({ rpm }) => rpm >= 2400);

    expect(advice.after.shortfalls).toEqual([]);
    expect(Math.min(...fast.map(({ fromMinute }) => fromMinute))).toBeLessThanOrEqual(570);
    expect(Math.max(...fast.map(({ toMinute }) => toMinute))).toBeGreaterThanOrEqual(750);
  });

  it('gives the heater its flow, keeps quiet hours, and gives the cell its hours', () => {
    const quiet = [{ days: EVERY_DAY, fromMinute: 22 * 60, toMinute: 7 * 60, maximumRpm: 1500 }];
    const windows = [window('heater', 8, 9, { minimumGpm: 40 })];
    const hours = { kind: 'cell' as const, minimumGpm: 30, hours: 6 };
    const advice = adviceOf({
      ...plain,
      entryLimit: 2,
      needs: needs({ gallonsPerDay: 15_000, quiet, windows, hours }),
    });

    expect(advice.after.shortfalls).toEqual([]);
    const slowest = (minutes: (from: number) => boolean) =>
      advice.after.week
        .filter(({ from }) => minutes((from / 60_000) % 1440))
        .map(({ rpm, source }) => (source === 'prime' ? 0 : rpm));
    expect(Math.max(...slowest((minute) => minute >= 22 * 60 || minute < 7 * 60))).toBeLessThanOrEqual(1500);
  });

  it('lets a heated weekend have a program of its own', () => {
    const windows = [{ ...window('spa', 10, 16, { minimumRpm: 3000 }), days: WEEKEND }];
    const advice = adviceOf({ ...plain, needs: needs({ windows }) });

    expect(advice.after.shortfalls).toEqual([]);
    const weekdaysAt3000 = advice.after.program.filter(({ rpm, days }) => rpm >= 3000 && days[0] === true);
    expect(weekdaysAt3000).toEqual([]);
  });

  it('keeps a program that nothing beats', () => {
    const first = adviceOf(plain);
    const second = adviceOf({ ...plain, settings: { ...plain.settings, program: first.after.program } });

    expect(second.kind).toBe('keep');
    expect(second.savedShare).toBeCloseTo(0, 3);
  });

  it('advises what the present program leaves short, though it costs more', () => {
    const lazy = { ...plain.settings, program: [] };
    const advice = adviceOf({ ...plain, settings: lazy });

    expect(advice.kind).toBe('advice');
    expect(advice.before.shortfalls).toEqual([
      { need: 'daily-volume', weekdays: [0, 1, 2, 3, 4, 5, 6], short: 20_000 },
    ]);
    expect(advice.savedShare).toBeLessThan(0);
  });

  it('is bounded beforehand by what any program could save', () => {
    const clock = { input: 1, window: { days: EVERY_DAY, onMinute: 600, offMinute: 780, opensEarlyMinutes: 0 } };
    for (const request of [REQUEST, plain, { ...plain, windows: [clock] }])
      expect(adviceOf(request).savedShare).toBeLessThanOrEqual((mostSavedShare(request) ?? -1) + 1e-9);
    expect(mostSavedShare({ ...plain, month: 12 })).toBeUndefined();
    expect(mostSavedShare({ ...plain, needs: needs({ gallonsPerDay: 200_000 }) })).toBeUndefined();
  });

  it('leaves no need short, whatever it is asked', () => {
    const hour = fc.integer({ min: 0, max: 23 });
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 60_000 }),
        hour,
        fc.integer({ min: 1, max: 6 }),
        fc.integer({ min: 10, max: 60 }),
        hour,
        fc.integer({ min: 1, max: 4 }),
        (gallonsPerDay, from, length, minimumGpm, on, entryLimit) => {
          const windows = [window('heater', from, (from + length) % 24, { minimumGpm })];
          const clock = {
            input: 1,
            window: {
              days: EVERY_DAY,
              onMinute: on * 60 + 7,
              offMinute: ((on + 3) % 24) * 60 + 20,
              opensEarlyMinutes: 11,
            },
          };
          const advice = adviseProgram({
            ...plain,
            entryLimit,
            windows: [clock],
            needs: needs({ gallonsPerDay, windows }),
          });
          if (advice.kind === 'infeasible') {
            expect(advice.unmet.length).toBeGreaterThan(0);
            return;
          }
          if (advice.kind === 'refused') throw new Error(JSON.stringify(advice));
          expect(advice.after.shortfalls).toEqual([]);
          expect(advice.after.program.length).toBeLessThanOrEqual(entryLimit);
        },
      ),
      { numRuns: 12 },
    );
  });
});

describe('needs that no program meets', () => {
  it('are named: more water than it can move', () => {
    expect(unmetOf({ ...plain, needs: needs({ gallonsPerDay: 200_000 }) })).toMatchObject([
      { need: 'daily-volume', reason: 'more-than-it-can-move', wanted: 200_000, weekdays: [0, 1, 2, 3, 4, 5, 6] },
    ]);
  });

  it('are named: a flow beyond the top speed', () => {
    expect(
      unmetOf({ ...plain, needs: needs({ windows: [window('heater', 8, 10, { minimumGpm: 150 })] }) }),
    ).toMatchObject([{ need: 'heater', reason: 'beyond-top-speed', reachable: 3450 }]);
  });

  it('are named: a heater in the quiet hours, on its own days', () => {
    const quiet = [{ days: WEEKEND, fromMinute: 0, toMinute: 1440, maximumRpm: 1500 }];

    expect(
      unmetOf({ ...plain, needs: needs({ quiet, windows: [window('heater', 8, 10, { minimumRpm: 2400 })] }) }),
    ).toMatchObject([
      { need: 'heater', reason: 'against-quiet-hours', weekdays: [5, 6], wanted: 2400, reachable: 1500 },
    ]);
  });

  it('are named: an input that holds the motor too slow', () => {
    const clock = { input: 1, window: { days: EVERY_DAY, onMinute: 600, offMinute: 780, opensEarlyMinutes: 0 } };
    const settings = { ...plain.settings, inputs: [1200, null, null] };

    expect(
      unmetOf({
        ...plain,
        settings,
        windows: [clock],
        needs: needs({ windows: [window('cleaner', 10, 12, { minimumRpm: 2400 })] }),
      }),
    ).toMatchObject([{ need: 'cleaner', reason: 'input-too-slow', wanted: 2400, reachable: 1200 }]);
  });

  it('are named: more hours of flow than the day allows', () => {
    const quiet = [{ days: EVERY_DAY, fromMinute: 6 * 60, toMinute: 5 * 60, maximumRpm: 1000 }];

    expect(
      unmetOf({
        ...plain,
        needs: needs({ gallonsPerDay: 0, quiet, hours: { kind: 'cell', minimumGpm: 50, hours: 8 } }),
      }),
    ).toMatchObject([{ need: 'flow-hours', reason: 'more-than-it-can-move', wanted: 8, reachable: 1 }]);
  });

  it('are named: more entries than the motor has', () => {
    const windows = [window('heater', 6, 8, { minimumRpm: 3000 }), window('spa', 18, 20, { minimumRpm: 3000 })];
    const quiet = [9, 21].map((hour) => ({
      days: EVERY_DAY,
      fromMinute: hour * 60,
      toMinute: ((hour + 8) % 24) * 60,
      maximumRpm: 1500,
    }));

    expect(unmetOf({ ...plain, entryLimit: 1, needs: needs({ windows, quiet }) })).toMatchObject([
      { need: 'entry-limit', reason: 'too-few-entries', wanted: 2, reachable: 1 },
    ]);
  });
});

describe('what the advisor refuses', () => {
  it.each([
    ['a month that is none', { month: 12 }, 'month'],
    ['half an entry', { entryLimit: 1.5 }, 'entryLimit'],
    ['negative water', { needs: needs({ gallonsPerDay: -1 }) }, 'needs.gallonsPerDay'],
    ['water that is no number', { needs: needs({ gallonsPerDay: Number.NaN }) }, 'needs.gallonsPerDay'],
    [
      'an endless flow',
      { needs: needs({ windows: [window('heater', 1, 2, { minimumGpm: Number.POSITIVE_INFINITY })] }) },
      'needs.windows[0].minimumGpm',
    ],
    ['a window that asks nothing', { needs: needs({ windows: [window('heater', 1, 2, {})] }) }, 'needs.windows[0]'],
    [
      'a window of no length',
      { needs: needs({ windows: [window('heater', 2, 2, { minimumGpm: 20 })] }) },
      'needs.windows[0].toMinute',
    ],
    [
      'six days',
      { needs: needs({ quiet: [{ days: EVERY_DAY.slice(1), fromMinute: 0, toMinute: 60, maximumRpm: 900 }] }) },
      'needs.quiet[0].days',
    ],
    ['other use that is no number', { otherKwhByPeriod: [Number.NaN] }, 'otherKwhByPeriod[0]'],
    ['a keypad step of nothing', { speedStepRpm: 0 }, 'speedStepRpm'],
    ['a system that cannot be', { system: { staticFeet: 0, k: 0 } }, 'system'],
    [
      'a program of no length',
      { settings: { ...REQUEST.settings, program: [{ days: EVERY_DAY, fromMinute: 60, toMinute: 60, rpm: 1700 }] } },
      'program[0].toMinute',
    ],
    [
      'a tariff with a hole',
      { tariff: { ...TWO_TIER, energy: { ...TWO_TIER.energy, weekday: [] } } },
      'energy.weekday[0][0]',
    ],
  ])('%s, by name', (_, change, field) => {
    const advice = adviseProgram({ ...REQUEST, ...change });

    expect(advice.kind).toBe('refused');
    expect(advice.kind === 'refused' ? advice.refusals.map((one) => one.field) : []).toContain(field);
  });
});
