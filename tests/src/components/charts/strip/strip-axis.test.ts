import { describe, expect, it } from 'vitest';
import { instantOf } from '#shared/domain/time/instant-of.ts';
import { axisLabel } from '#src/components/charts/strip/axis-label.ts';
import { moveCursor } from '#src/components/charts/strip/cursor-keys.ts';
import { handleBox, restingAt } from '#src/components/charts/strip/handle-box.ts';
import { listRules, listTicks } from '#src/components/charts/strip/strip-ticks.ts';
import { createFormat } from '#src/lib/format/create-format.ts';

const ZONE = 'America/Los_Angeles';
const HOUR = 3_600_000;
/** 8 March 2026 has 23 hours in Los Angeles, 1 November 25. Source: US daylight saving, 2nd Sunday of March, 1st of November. */
const dayOf = (month: number, day: number) => {
  const epochDay = Date.UTC(2026, month, day) / 86_400_000;
  return { from: instantOf(ZONE, epochDay, 0) ?? 0, until: instantOf(ZONE, epochDay + 1, 0) ?? 0 };
};
const usual = dayOf(11, 1);

describe('ticks', () => {
  it('stand at whole local hours, as many as there is room for', () => {
    expect(listTicks(usual, ZONE, 960, 80).map(({ minute }) => minute / 60)).toEqual([
      0, 2, 4, 6, 8, 10, 12, 14, 16, 18, 20, 22,
    ]);
    expect(listTicks(usual, ZONE, 300, 80).map(({ minute }) => minute / 60)).toEqual([0, 12]);
  });

  it('are right on the day with 23 hours and on the one with 25', () => {
    const short = listTicks(dayOf(2, 8), ZONE, 920, 80);
    expect(short.at(-1)?.x).toBeCloseTo((21 / 23) * 920, 5);
    const long = listTicks(dayOf(10, 1), ZONE, 1000, 120);
    expect(long.map(({ minute }) => minute / 60)).toEqual([0, 3, 6, 9, 12, 15, 18, 21]);
    expect(long[1]?.x).toBeCloseTo((4 / 25) * 1000, 5);
  });

  it('are midnights where the paper is a week long, and strong rules with them', () => {
    const week = { from: usual.from - 6 * 24 * HOUR, until: usual.until };
    expect(listTicks(week, ZONE, 900, 84).every(({ minute }) => minute === 0)).toBe(true);
    expect(listRules(week, ZONE, 900).strong).toHaveLength(7);
    expect(listRules(usual, ZONE, 900).strong.map(({ minute }) => minute / 60)).toEqual([0, 6, 12, 18]);
  });

  it('are minutes where the paper is short', () => {
    const short = { from: usual.from + 23 * HOUR, until: usual.until };
    expect(listTicks(short, ZONE, 400, 84).map(({ minute }) => minute)).toEqual([1380, 1395, 1410, 1425]);
  });

  it('are none for a zone that nobody knows', () => {
    expect(listTicks(usual, 'Mars/Olympus', 900, 80)).toEqual([]);
  });
});

describe('a tick’s label', () => {
  const american = createFormat({ locale: 'en-US', preferences: { units: 'us', clock: 'locale' } });
  const german = createFormat({ locale: 'de-DE', preferences: { units: 'si', clock: 'locale' } });

  it('says midnight and noon to those who count to twelve', () => {
    expect(axisLabel({ at: usual.from, minute: 0 }, usual, ZONE, american)).toBe('midnight');
    expect(axisLabel({ at: usual.from + 12 * HOUR, minute: 720 }, usual, ZONE, american)).toBe('noon');
    expect(axisLabel({ at: usual.from, minute: 0 }, usual, ZONE, german)).toBe('00:00');
  });

  it('names days where there are several', () => {
    const week = { from: usual.from - 6 * 24 * HOUR, until: usual.until };
    expect(axisLabel({ at: usual.from, minute: 0 }, week, ZONE, american)).toBe('Tue, Dec 1');
  });
});

describe('the cursor’s handle', () => {
  const window = { from: 0, until: 24 * HOUR };

  it('rests at now, or at the end that is nearer to it', () => {
    expect([restingAt(HOUR, window), restingAt(-5, window), restingAt(99 * HOUR, window)]).toEqual([
      HOUR,
      0,
      24 * HOUR - 1,
    ]);
  });

  it('turns to the left before it leaves the paper', () => {
    expect(handleBox(HOUR, window, 480, 7)).toEqual({ x: 20, left: 20, right: 90 });
    expect(handleBox(23 * HOUR, window, 480, 7)).toMatchObject({ right: 460, left: 390 });
  });

  it('moves by keys, never off the paper', () => {
    const move = (key: string, shift = false, at?: number) => moveCursor(key, shift, at, window, 20 * HOUR);
    expect(move('ArrowLeft')).toBe(20 * HOUR - 300_000);
    expect(move('ArrowRight', true, HOUR)).toBe(2 * HOUR);
    expect(move('PageUp', false, 24 * HOUR - 1)).toBe(24 * HOUR - 1);
    expect(move('Home')).toBe(0);
    expect(move('End')).toBe(24 * HOUR - 1);
    expect(move('Enter')).toBeUndefined();
  });
});
