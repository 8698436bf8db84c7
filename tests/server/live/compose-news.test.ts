import { describe, expect, it } from 'vitest';
import { type CompanyNews, composeNews } from '#server/live/compose-news.ts';

const NEWS: CompanyNews = {
  cursor: '7',
  pumps: [
    { pumpId: 'a', text: '{"pumpId":"a"}' },
    { pumpId: 'b', text: '{"pumpId":"b"}' },
  ],
  runs: [
    { pumpId: 'a', from: 50, text: '"run 50"' },
    { pumpId: 'a', from: 150, text: '"run 150"' },
  ],
  alarms: [
    { pumpId: 'a', from: 60, text: '"alarm 60"', textForHomeowner: '"plain 60"' },
    { pumpId: 'a', from: 160, text: '"alarm 160"', textForHomeowner: '"plain 160"' },
  ],
};
const parse = (text: string | undefined) => (text === undefined ? undefined : JSON.parse(text));

describe('news for one connection', () => {
  it('brings nothing of before the day a homeowner moved in, and no staff words', () => {
    const frame = parse(
      composeNews(NEWS, { role: 'homeowner', visible: new Map([['a', 100]]), watched: new Set(['a', 'b']) }),
    );

    expect(frame).toEqual({
      type: 'news',
      cursor: '7',
      pumps: [{ pumpId: 'a' }],
      runs: ['run 150'],
      alarms: ['plain 160'],
    });
  });

  it('brings pumps that are not on screen only with their alarms', () => {
    const frame = parse(composeNews(NEWS, { role: 'manager', visible: 'all', watched: new Set() }));

    expect(frame).toMatchObject({ pumps: [{ pumpId: 'a' }], runs: [], alarms: ['alarm 60', 'alarm 160'] });
  });

  it('is no frame at all where nothing is left', () => {
    expect(composeNews(NEWS, { role: 'homeowner', visible: new Map(), watched: new Set(['a']) })).toBeUndefined();
  });
});
