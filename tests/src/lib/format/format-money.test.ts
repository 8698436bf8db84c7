import { describe, expect, it } from 'vitest';
import { formatMoney } from '#src/lib/format/format-money.ts';

describe('money', () => {
  it('is written in its currency, with its own decimals', () => {
    expect(formatMoney('1234.5', 'USD', 'en-US')).toBe('$1,234.50');
    expect(formatMoney('-0.50', 'USD', 'en-US')).toBe('-$0.50');
    expect(formatMoney('1200', 'JPY', 'en-US')).toBe('¥1,200');
    expect(formatMoney('12.34', 'EUR', 'de-DE').replaceAll('\u00a0', ' ')).toBe('12,34 €');
  });

  it('is never a binary fraction: every digit of a long amount stands', () => {
    expect(formatMoney('123456789012.34', 'USD', 'en-US')).toBe('$123,456,789,012.34');
    expect(formatMoney('1.005', 'USD', 'en-US')).toBe('$1.01');
  });

  it('keeps the tenths of a cent of a price', () => {
    expect(formatMoney('0.31245', 'USD', 'en-US', true)).toBe('$0.31245');
    expect(formatMoney('0.3', 'USD', 'en-US', true)).toBe('$0.30');
  });

  it('is a dash where nobody knows it', () => {
    expect(formatMoney(null, 'USD', 'en-US')).toBe('–');
    expect(formatMoney('1', null, 'en-US')).toBe('–');
  });
});
