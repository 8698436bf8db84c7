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
