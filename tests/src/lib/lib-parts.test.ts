import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createBatcher } from '#src/lib/create-batcher.ts';
import { formatDayParam, parseDayParam } from '#src/lib/day-param.ts';
import { listClosed } from '#src/lib/list-closed.ts';
import { paths } from '#src/lib/paths.ts';
import { changeSearch, readOneOf, readText } from '#src/lib/read-search.ts';
import { readReturnPath } from '#src/lib/return-path.ts';

describe('the page to come back to after signing in', () => {
  it('is one of ours, with its query', () => {
    expect(readReturnPath('/alarms/7?show=all#top')).toBe('/alarms/7?show=all#top');
  });

  it('is never another site, the sign-in page itself or the interface', () => {
    for (const to of [
      null,
      '',
      'https://elsewhere.example/',
      '//elsewhere.example',
      '/\\elsewhere.example',
      '/sign-in?to=%2F',
      '/api/session',
      'javascript:alert(1)',
    ]) {
      expect(readReturnPath(to), String(to)).toBe('/');
    }
  });
});

describe('a day in an address', () => {
  it('comes back as it went', () => {
    fc.assert(fc.property(fc.integer({ min: 0, max: 60_000 }), (day) => parseDayParam(formatDayParam(day)) === day));
  });

  it('is nothing when it is no day', () => {
    expect(['2026-02-30', '2026-13-01', '1 December', '', null].map(parseDayParam)).toEqual(Array(5).fill(undefined));
  });
});

describe('a search', () => {
  it('keeps to its vocabulary, trims and cuts free text', () => {
    expect(readOneOf(['24h', '7d'], '8d')).toBeUndefined();
    expect(readText('  Weir House ', 6)).toBe('Weir H');
    expect(readText('   ', 6)).toBeUndefined();
  });

  it('leaves out what is usual, empty or taken away', () => {
    const search = new URLSearchParams('q=weir&sort=name&day=2026-12-01');
    expect(
      changeSearch(search, { sort: 'worst', q: '', day: undefined, area: 'North' }, { sort: 'worst' }).toString(),
    ).toBe('area=North');
  });
});

it('lists the closed inputs of a mask', () => {
  expect([0, 1, 0b101, 0b1000_0000].map(listClosed)).toEqual([[], [1], [1, 3], [8]]);
});

it('sends a sign-in back to a page only when that is not the first one anyway', () => {
  expect(paths.signIn('/')).toBe('/sign-in');
  expect(paths.signIn('/alarms/7')).toBe('/sign-in?to=%2Falarms%2F7');
});

describe('a batcher', () => {
  const setUp = (most: number) => {
    const asked: (readonly string[])[] = [];
    let flush: () => void = () => undefined;
    const ask = createBatcher({
      load: async (keys) => {
        asked.push(keys);
        if (keys.includes('broken')) throw new Error('no answer');
        return new Map(keys.filter((key) => key !== 'missing').map((key) => [key, key.toUpperCase()]));
      },
      missing: (key) => new Error(`no ${key}`),
      most,
      defer: (run) => {
        flush = run;
      },
    });
    return { ask, asked, flush: () => flush() };
  };

  it('asks once for what is asked for together, each key once', async () => {
    const { ask, asked, flush } = setUp(10);
    const answers = Promise.all([ask('a'), ask('b'), ask('a')]);
    flush();
    expect(await answers).toEqual(['A', 'B', 'A']);
    expect(asked).toEqual([['a', 'b']]);
  });

  it('keeps to the most that one request takes', async () => {
    const { ask, asked, flush } = setUp(2);
    const answers = Promise.all(['a', 'b', 'c'].map(ask));
    flush();
    await answers;
    expect(asked).toEqual([['a', 'b'], ['c']]);
  });

  it('refuses what the answer does not hold, and all of a request that fails', async () => {
    const missing = setUp(10);
    const results = Promise.allSettled([missing.ask('a'), missing.ask('missing')]);
    missing.flush();
    expect((await results).map(({ status }) => status)).toEqual(['fulfilled', 'rejected']);
    const broken = setUp(10);
    const refused = Promise.allSettled([broken.ask('a'), broken.ask('broken')]);
    broken.flush();
    expect((await refused).map(({ status }) => status)).toEqual(['rejected', 'rejected']);
  });
});
