import { describe, expect, it } from 'vitest';
import { wallWindow } from '#src/features/fleet/wall-window.ts';

const ZONE = 'America/Los_Angeles';
const HOUR = 3_600_000;
const NOW = Date.UTC(2026, 11, 2, 3, 37);
const TODAY = 20_788;
const hours = ({ from, until }: { from: number; until: number }) => (until - from) / HOUR;

describe('live', () => {
  it('shows a full day behind now and some of the plan ahead', () => {
    const window = wallWindow('24h', undefined, NOW, ZONE);
    expect(window.live).toBe(true);
    expect(NOW - window.from).toBeGreaterThanOrEqual(24 * HOUR);
    expect(window.until - NOW).toBeGreaterThanOrEqual(4 * HOUR);
  });

  it('stands still for a quarter of an hour', () => {
    expect(wallWindow('24h', undefined, NOW + 7 * 60_000, ZONE)).toEqual(wallWindow('24h', undefined, NOW, ZONE));
  });

  it('asks for no more than the interface gives: eight days, widened to quarters of a day', () => {
    expect(hours(wallWindow('7d', undefined, NOW, ZONE)) + 12).toBeLessThanOrEqual(8 * 24 + 0.25);
  });

  it('leads to yesterday, and a day to come is now', () => {
    expect(wallWindow('24h', undefined, NOW, ZONE).earlier).toBe(TODAY - 1);
    expect(wallWindow('24h', TODAY + 5, NOW, ZONE).live).toBe(true);
  });
});

describe('a day of the past', () => {
  it('is a calendar day of the company’s zone', () => {
    const window = wallWindow('24h', TODAY - 1, NOW, ZONE);
    expect(window.from).toBe(Date.UTC(2026, 10, 30, 8));
    expect(hours(window)).toBe(24);
    expect(window).toMatchObject({ live: false, earlier: TODAY - 2, later: undefined });
  });

  it('lasts 23 hours when clocks go forward and 25 when they go back', () => {
    const epochDay = (month: number, day: number) => Date.UTC(2026, month, day) / 86_400_000;
    expect(hours(wallWindow('24h', epochDay(2, 8), NOW, ZONE))).toBe(23);
    expect(hours(wallWindow('24h', epochDay(10, 1), NOW, ZONE))).toBe(25);
  });

  it('goes by weeks where weeks are shown', () => {
    const window = wallWindow('7d', TODAY - 10, NOW, ZONE);
    expect(hours(window)).toBe(7 * 24);
    expect(window).toMatchObject({ earlier: TODAY - 17, later: TODAY - 3 });
  });
});
