import { describe, expect, it } from 'vitest';
import { createFormat } from '#src/lib/format/create-format.ts';

const EVENING = Date.UTC(2026, 11, 2, 3, 30);
const ZONE = 'America/Los_Angeles';
const us = createFormat({ locale: 'en-US', preferences: { units: 'us', clock: 'locale' } });
const si = createFormat({ locale: 'de-DE', preferences: { units: 'si', clock: 'locale' } });

describe('figures', () => {
  it('carry their units and the locale’s separators', () => {
    expect(us.rpm(1400)).toBe('1,400 rpm');
    expect(si.rpm(1400)).toBe('1.400 rpm');
  });

  it('are shown in the units the reader chose', () => {
    expect(us.quantity(24_000, 'volume')).toBe('24,000 gal');
    expect(si.quantity(24_000, 'volume')).toBe('90,8 m³');
    expect(us.quantity(4.4, 'temperature')).toBe('40 °F');
    expect(si.quantity(4.4, 'temperature')).toBe('4,4 °C');
  });
});

describe('a moment', () => {
  it('is a time alone today, and has its day on any other', () => {
    expect(us.moment(EVENING - 3_600_000, ZONE, EVENING)).toBe('6:30\u00a0PM');
    expect(us.moment(EVENING - 86_400_000, ZONE, EVENING)).toBe('Mon, Nov 30, 7:30\u00a0PM');
  });

  it('is of another day when the pad’s midnight lies between, not the reader’s', () => {
    const afterMidnight = Date.UTC(2026, 11, 2, 8, 30);
    expect(us.moment(EVENING, ZONE, afterMidnight)).toBe('Tue, Dec 1, 7:30\u00a0PM');
    expect(us.moment(EVENING, 'UTC', afterMidnight)).toBe('3:30\u00a0AM');
  });
});

it('tells seconds where a stretch is short and minutes where it is not', () => {
  expect(us.span(52_000)).toBe('52 s');
  expect(us.span(130_000)).toBe('2 min');
  expect(us.span(-5)).toBe('0 s');
});
