/**
 * Money inside a computation: millionths of the currency's unit, not rounded, so that a price of 0.34567 a kWh is the
 * whole number 345670. It becomes minor units (cents) once, at the end, by `toMinorUnits` or `apportionMinorUnits`.
 */
export type Micros = number;

const MICROS = 1_000_000;

/** Asking the platform takes a hundred times as long as rounding; there are under two hundred currencies. */
const digitsByCurrency = new Map<string, number>();

/**
 * How many decimals a currency (ISO 4217) has; 2 for one that the platform does not know.
 *
 * @example minorDigits('USD') // 2
 */
export function minorDigits(currency: string): number {
  const known = digitsByCurrency.get(currency);
  if (known !== undefined) return known;
  if (!/^[A-Z]{3}$/.test(currency)) return 2;
  const digits =
    new Intl.NumberFormat('en', { style: 'currency', currency }).resolvedOptions().maximumFractionDigits ?? 2;
  digitsByCurrency.set(currency, digits);
  return digits;
}

/** Half a minor unit goes away from zero, as on a bill; a hair under half is taken for half, since sums are binary. */
const roundHalfAway = (value: number): number => {
  const rounded = Math.round(Math.abs(value) + 1e-9);
  return value < 0 && rounded !== 0 ? -rounded : rounded;
};

/**
 * Whole minor units (cents) of an amount in micros: rounded once, half away from zero. undefined for an amount that is
 * not finite.
 *
 * @example toMinorUnits(1_234_999, 'USD') // 123
 */
export function toMinorUnits(amount: Micros, currency: string): number | undefined {
  if (!Number.isFinite(amount)) return undefined;
  return roundHalfAway((amount / MICROS) * 10 ** minorDigits(currency));
}

/**
 * Whole minor units for the parts of an amount, such that they add up to the rounded whole: every part is rounded
 * down, and what is missing goes to the largest remainders, the first of equals. undefined for a part that is not finite.
 *
 * @example apportionMinorUnits([3_333_333, 3_333_333, 3_333_334], 'USD') // [333, 333, 334]
 * Source: largest-remainder apportionment.
 */
export function apportionMinorUnits(parts: readonly Micros[], currency: string): number[] | undefined {
  const whole = toMinorUnits(
    parts.reduce((sum, part) => sum + part, 0),
    currency,
  );
  if (whole === undefined) return undefined;
  const exact = parts.map((part) => (part / MICROS) * 10 ** minorDigits(currency));
  const floors = exact.map((value) => Math.floor(value + 1e-9));
  const missing = whole - floors.reduce((sum, value) => sum + value, 0);
  const order = exact
    .map((value, index) => ({ index, rest: value - (floors[index] ?? 0) }))
    .sort((left, right) => right.rest - left.rest || left.index - right.index);
  const raised = new Set(order.slice(0, Math.max(0, missing)).map(({ index }) => index));
  return floors.map((value, index) => value + (raised.has(index) ? 1 : 0));
}
