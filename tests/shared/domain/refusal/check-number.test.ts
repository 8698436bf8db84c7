import { describe, expect, it } from 'vitest';
import { checkNumber, checkNumbers } from '#shared/domain/refusal/check-number.ts';

describe('number check', () => {
  const rule = { field: 'watts', unit: 'W', least: 0, most: 6000 };

  it.each([0, 1.5, 6000])('lets %s through', (value) => {
    expect(checkNumber(value, rule)).toEqual([]);
  });

  it.each([
    [-1, 'too-small'],
    [6001, 'too-large'],
    [Number.NaN, 'not-finite'],
    [Number.POSITIVE_INFINITY, 'not-finite'],
    ['12', 'not-finite'],
    [undefined, 'not-finite'],
  ])('refuses %s as %s, naming the field and what it may be', (value, reason) => {
    expect(checkNumber(value, rule)).toEqual([
      { reason, field: 'watts', allowed: 'a finite number from 0 up to 6000 W' },
    ]);
  });

  it('excludes the bound of `above` and asks for whole numbers where told to', () => {
    expect(checkNumber(0, { field: 'k', unit: '', above: 0 })).toMatchObject([
      { reason: 'too-small', allowed: 'a finite number above 0' },
    ]);
    expect(checkNumber(1.5, { field: 'n', unit: '', whole: true })).toMatchObject([
      { reason: 'not-whole', allowed: 'a whole number' },
    ]);
  });

  it('lists the faults of several numbers in order', () => {
    expect(
      checkNumbers([
        [Number.NaN, rule],
        [5, rule],
        [-1, { ...rule, field: 'standbyWatts' }],
      ]).map(({ field }) => field),
    ).toEqual(['watts', 'standbyWatts']);
  });
});
