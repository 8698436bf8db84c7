import { describe, expect, it } from 'vitest';
import { formatDay, formatMinuteOfDay, formatTime, isTwelveHour } from '#src/lib/format/format-time.ts';

const EVENING = Date.UTC(2026, 11, 2, 3, 30);
const american = { locale: 'en-US', clock: 'locale' } as const;

describe('a time of day', () => {
  it('is told in the pad’s zone, whatever zone the reader is in', () => {
    expect(formatTime(EVENING, 'America/Los_Angeles', american)).toBe('7:30\u00a0PM');
    expect(formatTime(EVENING, 'America/Denver', american)).toBe('8:30\u00a0PM');
  });

  it('drops the zeros of a full hour on a twelve-hour clock only', () => {
    expect(formatTime(EVENING - 90 * 60_000, 'America/Los_Angeles', american)).toBe('6\u00a0PM');
    expect(formatTime(EVENING - 90 * 60_000, 'America/Los_Angeles', { locale: 'en-US', clock: '24' })).toBe('18:00');
  });

  it('follows the locale unless the reader chose otherwise', () => {
    expect(isTwelveHour('en-US', 'locale')).toBe(true);
    expect(isTwelveHour('de-DE', 'locale')).toBe(false);
    expect(isTwelveHour('de-DE', '12')).toBe(true);
    expect(isTwelveHour('en-US', '24')).toBe(false);
  });

  it('shows midnight as 00:00 on a 24-hour clock, never as 24:00 of the day before', () => {
    expect(formatTime(Date.UTC(2026, 11, 2, 8), 'America/Los_Angeles', { locale: 'en-US', clock: '24' })).toBe('00:00');
  });

  it('shows the end of a program’s day as 24:00', () => {
    expect(formatMinuteOfDay(1440, { locale: 'en-US', clock: '24' })).toBe('24:00');
    expect(formatMinuteOfDay(390, american)).toBe('6:30\u00a0AM');
  });

  it('is a dash for a zone that nobody knows', () => {
    expect(formatTime(EVENING, 'Mars/Olympus', american)).toBe('–');
  });
});

it('names the calendar day at the pad, which may be another one than the reader’s', () => {
  expect(formatDay(EVENING, 'America/Los_Angeles', 'en-US')).toBe('Tue, Dec 1');
  expect(formatDay(EVENING, 'Europe/Berlin', 'en-US')).toBe('Wed, Dec 2');
});
