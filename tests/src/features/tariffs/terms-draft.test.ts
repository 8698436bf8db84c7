import { describe, expect, it } from 'vitest';
import { addTerm, faultyDays, isSameTerms, termDrafts, termsOf } from '#src/features/tariffs/terms-draft.ts';
import { usersText } from '#src/features/tariffs/users-text.ts';
import { createFormat } from '#src/lib/format/create-format.ts';

const format = createFormat({ locale: 'en-US', preferences: { units: 'us', clock: 'locale' } });
const stored = [
  { tariffId: 'a', from: '2024-01-01', to: '2026-04-01' },
  { tariffId: 'b', from: '2026-04-01', to: null },
];

describe('terms', () => {
  it('end where the next begins, the last never: no hole can be written', () => {
    expect(termsOf(termDrafts(stored))).toEqual(stored);
    const [first, last] = termDrafts(stored);
    expect(termsOf([first!, { ...last!, day: '2026-07-01' }])[0]).toMatchObject({ to: '2026-07-01' });
    expect(termsOf([last!])).toEqual([{ tariffId: 'b', from: '2026-04-01', to: null }]);
  });

  it('are refused without a day, and with one that is not after the day before', () => {
    const [first, last] = termDrafts(stored);
    expect([...faultyDays([first!, { ...last!, day: '' }])]).toEqual([[2, 'day']]);
    expect([...faultyDays([first!, { ...last!, day: '2024-01-01' }])]).toEqual([[2, 'order']]);
    expect([...faultyDays(termDrafts(stored))]).toEqual([]);
  });

  it('are replaced by another tariff from today, or from a day to be chosen where the last one is still to come', () => {
    const added = addTerm(termDrafts(stored), ['a', 'b'], '2026-12-01');
    expect(added.at(-1)).toEqual({ id: 3, tariffId: 'a', day: '2026-12-01' });
    expect(addTerm(termDrafts(stored), ['b'], '2026-03-01').at(-1)).toEqual({ id: 3, tariffId: 'b', day: '' });
    expect(addTerm([], ['a'], '2026-12-01')).toEqual([{ id: 1, tariffId: 'a', day: '2026-12-01' }]);
    expect(isSameTerms(added, termDrafts(stored))).toBe(false);
  });
});

describe('who goes by a tariff', () => {
  const say = (id: string, pads: number, today: string) => usersText({ id, pads }, { terms: stored, today }, format);

  it('is said by the day it is', () => {
    expect(say('b', 0, '2026-12-01')).toBe('the company');
    expect(say('a', 0, '2026-12-01')).toBe('the company until Wed, Apr 1, 2026');
    expect(say('b', 1, '2026-01-01')).toBe('the company from Wed, Apr 1, 2026 and 1 pad of its own terms');
    expect(say('c', 2, '2026-12-01')).toBe('2 pads of their own terms');
    expect(say('c', 0, '2026-12-01')).toBe('nothing yet');
  });
});
