import { type Micros, minorDigits } from './money.ts';

const MICROS = 1_000_000;
const MICRO_DIGITS = 6;

/**
 * An amount as text in micros; undefined for anything but a plain decimal number with at most six decimals.
 *
 * @example parseMoney('0.34567') // 345670
 */
export function parseMoney(text: string): Micros | undefined {
  if (!/^-?\d{1,12}(\.\d{1,6})?$/.test(text)) return undefined;
  const micros = Math.round(Number(text) * MICROS);
  return micros === 0 ? 0 : micros;
}

/**
 * Micros as the shortest text, for prices: a price has as many decimals as it needs.
 *
 * @example formatMicros(345_670) // '0.34567'
 */
export function formatMicros(micros: Micros): string {
  const whole = Math.round(micros);
  const text = (whole / MICROS).toFixed(MICRO_DIGITS).replace(/\.?0+$/, '');
  return text === '-0' ? '0' : text;
}

/**
 * Whole minor units (cents) as text in the currency's own decimals.
 *
 * @example formatMinor(-50, 'USD') // '-0.50'
 */
export function formatMinor(minorUnits: number, currency: string): string {
  const digits = minorDigits(currency);
  const text = (minorUnits / 10 ** digits).toFixed(digits);
  return /^-0(\.0+)?$/.test(text) ? text.slice(1) : text;
}
