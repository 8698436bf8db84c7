import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { TariffShape } from '#shared/contract/http/tariffs.ts';
import {
  addPeriod,
  areaBetween,
  fillArea,
  removeMonthPrice,
  removePeriod,
  replacePeriod,
} from '#src/features/tariffs/edit-schedule.ts';
import { listStretches } from '#src/features/tariffs/list-stretches.ts';
import { placeOfFault } from '#src/features/tariffs/place-of-fault.ts';
import { priceRange } from '#src/features/tariffs/price-range.ts';
import { shapeOfDraft } from '#src/features/tariffs/shape-of-draft.ts';
import { draftOf, newDraft, newFlat, newSchedule, type TariffDraft } from '#src/features/tariffs/tariff-draft.ts';
import { collectFaults, refusalsOf } from '#src/features/tariffs/tariff-faults.ts';
import { ApiError } from '#src/lib/api/api-error.ts';
import { createFormat } from '#src/lib/format/create-format.ts';

const format = createFormat({ locale: 'en-US', preferences: { units: 'us', clock: 'locale' } });
const priced = (rate: string): TariffDraft => {
  const draft = newDraft('USD');
  const [period] = draft.energy.periods;
  const tiers = [{ ...period!.tiers[0]!, rate }];
  return { ...draft, name: 'One price', energy: replacePeriod(draft.energy, 0, { ...period!, tiers }) };
};
const summerEvenings = areaBetween({ month: 8, hour: 20 }, { month: 5, hour: 16 });

describe('a tariff’s draft', () => {
  it('says the same as the tariff it was made of', () => {
    const draft = priced('0.31456');
    const { shape } = shapeOfDraft({
      ...draft,
      monthlyAdjustment: Array.from({ length: 12 }, () => '0.01'),
      demand: replacePeriod(newSchedule(), 0, {
        id: 1,
        name: '',
        tiers: [{ rate: '9', adjustment: '1', upTo: '', perDay: false }],
      }),
      flatDemand: replacePeriod(newFlat(), 0, {
        id: 1,
        name: '',
        tiers: [{ rate: '4', adjustment: '0', upTo: '', perDay: false }],
      }),
    });
    expect(shapeOfDraft(draftOf(shape!)).shape).toEqual(shape);
  });

  it('takes amounts as people type them, and names the place of each that is none', () => {
    expect(shapeOfDraft(priced(' .12 ')).shape?.energy.periods[0]?.[0]?.rate).toBe('0.12');
    expect(shapeOfDraft({ ...priced('0.1'), fixedPerMonth: '1,200.5' }).shape?.fixedPerMonth).toBe('1200.5');
    expect(shapeOfDraft(priced('-0.02')).shape?.energy.periods[0]?.[0]?.rate).toBe('-0.02');
    for (const [text, reason] of [
      ['', 'empty'],
      ['cheap', 'money'],
      ['0.1234567', 'money'],
    ] as const)
      expect([text, shapeOfDraft(priced(text)).faults]).toEqual([
        text,
        [{ field: 'energy.periods[0][0].rateMicros', reason }],
      ]);
    expect(shapeOfDraft({ ...priced('0.1'), fixedPerMonth: '-3' }).faults).toEqual([
      { field: 'fixedMicrosPerMonth', reason: 'negative' },
    ]);
  });

  it('names a bound that is no number above 0, and drops “a day” from a tier without a bound', () => {
    const draft = priced('0.1');
    const withTiers = (upTo: string): TariffDraft => ({
      ...draft,
      energy: replacePeriod(draft.energy, 0, {
        ...draft.energy.periods[0]!,
        tiers: [
          { rate: '0.1', adjustment: '0', upTo, perDay: true },
          { rate: '0.2', adjustment: '', upTo: '', perDay: true },
        ],
      }),
    });
    expect(shapeOfDraft(withTiers('14')).shape?.energy.periods[0]).toEqual([
      { rate: '0.1', adjustment: '0', upTo: 14, perDay: true },
      { rate: '0.2', adjustment: '0', upTo: null, perDay: false },
    ]);
    for (const wrong of ['0', '-4', 'many'])
      expect(shapeOfDraft(withTiers(wrong)).faults).toEqual([{ field: 'energy.periods[0][0].upTo', reason: 'bound' }]);
  });
});

describe('the hours of a schedule', () => {
  it('are filled from one corner to another, whichever comes first, on the days that were drawn on', () => {
    const filled = fillArea(addPeriod(newSchedule()), 'weekday', summerEvenings, 1);
    expect(listStretches(filled.weekday)).toEqual([
      { fromMonth: 0, toMonth: 4, from: 0, to: 24, period: 0 },
      { fromMonth: 5, toMonth: 8, from: 0, to: 16, period: 0 },
      { fromMonth: 5, toMonth: 8, from: 16, to: 21, period: 1 },
      { fromMonth: 5, toMonth: 8, from: 21, to: 24, period: 0 },
      { fromMonth: 9, toMonth: 11, from: 0, to: 24, period: 0 },
    ]);
    expect(listStretches(filled.weekend)).toEqual([{ fromMonth: 0, toMonth: 11, from: 0, to: 24, period: 0 }]);
  });

  it('are left without a period where theirs is taken away, and the others keep theirs', () => {
    const three = fillArea(
      fillArea(addPeriod(addPeriod(newSchedule())), 'weekday', summerEvenings, 1),
      'weekend',
      summerEvenings,
      2,
    );
    const left = removePeriod(three, 1);
    expect(left.periods.map(({ id }) => id)).toEqual([1, 3]);
    expect(left.weekday[6]?.slice(15, 18)).toEqual([0, null, null]);
    expect(left.weekend[6]?.slice(15, 18)).toEqual([0, 1, 1]);
    expect(removeMonthPrice({ ...addPeriod(newFlat()), months: [0, 1] }, 0).months).toEqual([null, 0]);
  });

  it('in words are all of them once', () => {
    const matrix = fc.array(fc.array(fc.option(fc.integer({ min: 0, max: 2 })), { minLength: 24, maxLength: 24 }), {
      minLength: 12,
      maxLength: 12,
    });
    fc.assert(
      fc.property(matrix, (given) => {
        const back = given.map((hours) => hours.map((): number | null | undefined => undefined));
        for (const { fromMonth, toMonth, from, to, period } of listStretches(given))
          for (let month = fromMonth; month <= toMonth; month += 1)
            for (let hour = from; hour < to; hour += 1) {
              expect(back[month]![hour]).toBeUndefined();
              back[month]![hour] = period;
            }
        expect(back).toEqual(given);
      }),
    );
  });
});

describe('what keeps a tariff from being saved', () => {
  const faultsOf = (draft: TariffDraft, told: Parameters<typeof collectFaults>[2] = []) =>
    Object.fromEntries(collectFaults(draft, shapeOfDraft(draft), told, format));

  it('names a hole by days, months and hours, once', () => {
    const draft = priced('0.1');
    const energy = removePeriod(fillArea(addPeriod(draft.energy), 'weekday', summerEvenings, 1), 1);
    const told = [{ field: 'energy.weekday[5][16]', reason: 'hole-in-schedule', allowed: 'a period' }];
    expect(faultsOf({ ...draft, energy }, told)).toEqual({
      'energy.weekday': 'Monday to Friday, June – September, 4\u00a0PM to 9\u00a0PM has no period.',
    });
  });

  it('says how many more stretches have none', () => {
    const draft = priced('0.1');
    const twice = fillArea(addPeriod(draft.energy), 'weekday', summerEvenings, 1);
    const energy = removePeriod(
      fillArea(twice, 'weekday', areaBetween({ month: 0, hour: 0 }, { month: 0, hour: 3 }), 1),
      1,
    );
    expect(faultsOf({ ...draft, energy })['energy.weekday']).toMatch(
      /^Monday to Friday, January, .* and 1 more stretch have/,
    );
  });

  it('says what the server found in plain words, at its field', () => {
    const draft = priced('0.1');
    const faults = faultsOf(draft, [
      { field: 'name', reason: 'no-name', allowed: 'a name' },
      { field: 'energy.periods[0][1].upTo', reason: 'tiers-not-rising', allowed: 'more than 4' },
      { field: 'energy.periods[0][0].upTo', reason: 'not-a-number', allowed: 'above 0' },
      { field: 'flatDemand.months[3]', reason: 'unknown-period', allowed: '0' },
    ]);
    expect(faults).toEqual({
      name: 'Give it a name.',
      'energy.periods[0][1].upTo': 'Must be more than the tier below it.',
      'energy.periods[0][0].upTo': 'A number above 0.',
      'flatDemand.months[3]': 'Choose a price for every month.',
    });
    expect(placeOfFault('energy.periods[0][1].upTo', 'Wrong.', draft)).toBe('Energy, Period 1: Wrong.');
    expect(placeOfFault('fixedMicrosPerMonth', 'Wrong.', draft)).toBe('Fixed charge a month: Wrong.');
    expect(placeOfFault('energy.weekday', 'A hole.', draft)).toBe('A hole.');
  });

  it('reads the server’s refusal field by field, and no other error', () => {
    const issues = [{ path: 'name', message: 'no-name: a name: any' }];
    expect(refusalsOf(new ApiError('validation', 'no', { issues }))).toEqual([
      { field: 'name', reason: 'no-name', allowed: 'a name: any' },
    ]);
    expect(refusalsOf(new ApiError('conflict', 'no'))).toBeUndefined();
    expect(refusalsOf(undefined)).toBeUndefined();
  });
});

it('a tariff’s cheapest and dearest kWh have their adjustments in them', () => {
  const tier = (rate: string, adjustment: string) => ({ rate, adjustment, upTo: null, perDay: false });
  const energy: TariffShape['energy'] = {
    periods: [[tier('0.1', '0.01'), tier('0.4', '0')], [tier('-0.02', '0')]],
    weekday: [],
    weekend: [],
  };
  expect(priceRange({ energy })).toEqual({ least: '-0.02', most: '0.4' });
});
