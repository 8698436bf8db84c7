import { describe, expect, it } from 'vitest';
import {
  dayAfter,
  dayAt,
  daysOfMonth,
  earlierOf,
  monthAt,
  nameOfMonth,
  parseMonth,
  shiftMonth,
  usualMonth,
} from '#src/features/energy/local-month.ts';

describe('a month of an address', () => {
  it('is one of twelve, or nothing', () => {
    expect(parseMonth('2026-11')).toBe('2026-11');
    for (const text of ['2026-13', '2026-1', 'nov', '', null]) expect(parseMonth(text)).toBeUndefined();
  });

  it('moves over the turn of the year', () => {
    expect(shiftMonth('2026-12', 1)).toBe('2027-01');
    expect(shiftMonth('2027-01', -1)).toBe('2026-12');
    expect(shiftMonth('2026-12', -23)).toBe('2025-01');
  });

  it('ends with the day that is asked for, and has no days after it', () => {
    expect(daysOfMonth('2026-11', '2026-12-01')).toEqual({ from: '2026-11-01', until: '2026-12-01' });
    expect(daysOfMonth('2026-12', '2026-12-01')).toEqual({ from: '2026-12-01', until: '2026-12-02' });
    expect(daysOfMonth('2027-01', '2026-12-01')).toBeUndefined();
    expect(earlierOf('2027-01', '2026-12')).toBe('2026-12');
  });

  it('is the pad’s own, not the reader’s or UTC’s', () => {
    const at = Date.UTC(2026, 11, 1, 3);
    expect(monthAt('America/Los_Angeles', at)).toBe('2026-11');
    expect(dayAt('Europe/Berlin', at)).toBe('2026-12-01');
    expect(dayAfter('2028-02-28')).toBe('2028-02-29');
  });

  it('is the one before while the present one has only begun, if there was anything then', () => {
    expect(usualMonth('2026-12-03', undefined)).toBe('2026-11');
    expect(usualMonth('2027-01-01', '2026-11')).toBe('2026-12');
    expect(usualMonth('2026-12-03', '2026-12')).toBe('2026-12');
    expect(usualMonth('2026-12-04', '2026-11')).toBe('2026-12');
  });

  it('has a name', () => {
    expect(nameOfMonth('2026-11', 'en-US')).toBe('November 2026');
    expect(nameOfMonth('2026-11', 'en-US', 'short')).toBe('Nov 2026');
  });
});
