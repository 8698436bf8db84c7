import { expect, it } from 'vitest';
import type { Changes } from '#shared/contract/http/changes.ts';
import type { ServerFrame } from '#shared/contract/socket/frames.ts';
import type { News } from '#src/lib/live/gather-news.ts';
import { createLiveNews } from '#src/lib/live/live-news.ts';

const PUMP = '00000001-0000-4000-8000-000000000001';
const pump = (heardAt: number) => ({ pumpId: PUMP, now: null, heardAt, silentSince: null, alarm: null });
const news = (cursor: string, heardAt: number): ServerFrame => ({
  type: 'news',
  cursor,
  pumps: [pump(heardAt)],
  runs: [],
  alarms: [],
});
const hello = (cursor: string): ServerFrame => ({ type: 'hello', serverNow: 1000, cursor });

function setUp() {
  const applied: News[] = [];
  const asked: string[] = [];
  let answer: (changes: Changes) => void = () => undefined;
  let refuse: (error: Error) => void = () => undefined;
  let reloads = 0;
  let retries = 0;
  let flush: () => void = () => undefined;
  const hear = createLiveNews({
    listChanges: (since) => {
      asked.push(since);
      return new Promise((resolve, reject) => {
        answer = resolve;
        refuse = reject;
      });
    },
    apply: (each) => applied.push(each),
    reloadAll: () => {
      reloads += 1;
    },
    reloadFailed: () => {
      retries += 1;
    },
    setServerNow: () => undefined,
    defer: (run) => {
      flush = run;
    },
  });
  const settled = () => new Promise((resolve) => setImmediate(resolve));
  return {
    hear,
    applied,
    asked,
    reloads: () => reloads,
    retries: () => retries,
    flush: () => flush(),
    answer: async (changes: Partial<Changes>) => {
      answer({ cursor: '100', complete: true, pumps: [], runs: [], alarms: [], serverNow: 1, ...changes });
      await settled();
    },
    refuse: async () => {
      refuse(new Error('no answer'));
      await settled();
    },
  };
}

it('reads the screens again on the first hello, since what came before it may be older', () => {
  const live = setUp();
  live.hear(hello('10'));
  expect(live.reloads()).toBe(1);
  expect(live.asked).toEqual([]);
});

it('gathers frames and passes on only the latest word of each pump', () => {
  const live = setUp();
  live.hear(hello('10'));
  live.hear(news('11', 1));
  live.hear(news('12', 2));
  live.flush();
  expect(live.applied).toEqual([{ pumps: [pump(2)], runs: [], alarms: [] }]);
});

it('asks after a break for everything since the last frame it had used', async () => {
  const live = setUp();
  live.hear(hello('10'));
  live.hear(news('12', 2));
  live.flush();
  live.hear(hello('99'));
  expect(live.asked).toEqual(['12']);
  await live.answer({ cursor: '99', pumps: [pump(7)] });
  expect(live.applied.at(-1)?.pumps).toEqual([pump(7)]);
});

it('holds frames back while the gap is closed, drops those the answer covers and uses the rest', async () => {
  const live = setUp();
  live.hear(hello('10'));
  live.hear(hello('20'));
  live.hear(news('95', 3));
  live.hear(news('101', 9));
  live.flush();
  expect(live.applied).toEqual([]);
  await live.answer({ cursor: '100', pumps: [pump(5)] });
  expect(live.applied.map(({ pumps }) => pumps[0]?.heardAt)).toEqual([5, 9]);
});

it('reads everything again when there was too much to list, or the gap cannot be closed', async () => {
  const live = setUp();
  live.hear(hello('10'));
  live.hear({ type: 'resync', reason: 'slow' });
  await live.answer({ complete: false });
  live.hear({ type: 'resync', reason: 'slow' });
  await live.refuse();
  expect(live.reloads()).toBe(3);
});

it('moves its cursor with heartbeats, but never past frames that still wait', () => {
  const live = setUp();
  live.hear(hello('10'));
  live.hear(news('11', 1));
  live.hear({ type: 'heartbeat', serverNow: 1, cursor: '50' });
  live.hear(hello('60'));
  expect(live.asked).toEqual(['10']);
});

it('closes the gap once more when the connection broke again before the answer', async () => {
  const live = setUp();
  live.hear(hello('10'));
  live.hear(hello('20'));
  live.hear(hello('300'));
  expect(live.asked).toEqual(['10']);
  await live.answer({ cursor: '200', pumps: [pump(5)] });
  expect(live.asked).toEqual(['10', '200']);
  await live.answer({ cursor: '310', pumps: [pump(8)] });
  expect(live.applied.map(({ pumps }) => pumps[0]?.heardAt)).toEqual([5, 8]);
  live.hear(hello('400'));
  expect(live.asked).toEqual(['10', '200', '310']);
});

it('tries a gap that could not be closed again with the next heartbeat, from where it began', async () => {
  const live = setUp();
  live.hear(hello('10'));
  live.hear(hello('20'));
  await live.refuse();
  live.hear(news('25', 3));
  live.flush();
  expect(live.applied.map(({ pumps }) => pumps[0]?.heardAt)).toEqual([3]);
  live.hear({ type: 'heartbeat', serverNow: 1, cursor: '30' });
  expect(live.asked).toEqual(['10', '10']);
  await live.answer({ cursor: '30', pumps: [pump(4)] });
  expect(live.applied.at(-1)?.pumps).toEqual([pump(4)]);
  live.hear({ type: 'heartbeat', serverNow: 1, cursor: '40' });
  live.hear(hello('50'));
  expect(live.asked).toEqual(['10', '10', '40']);
});

it('lets what failed during a break be read again once the gap is closed', async () => {
  const live = setUp();
  live.hear(hello('10'));
  live.hear(hello('20'));
  await live.refuse();
  expect(live.retries()).toBe(0);
  live.hear(hello('30'));
  await live.answer({});
  expect(live.retries()).toBe(1);
});
