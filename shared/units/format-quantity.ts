import { QUANTITY_FORMATS, type Quantity, type QuantityFormat } from './quantity-formats.data.ts';
import type { UnitSystem } from './unit-system.ts';

/** How someone wants figures: their unit system, and a BCP 47 locale for separators; an unknown one is read as `en`. */
export type FormatOptions = { readonly system: UnitSystem; readonly locale: string };

/** A figure and its unit apart, so that a screen can set them in two sizes. */
export type QuantityParts = { readonly figure: string; readonly unit: string };

/** What stands where there is no figure. */
export const NO_FIGURE = '–';

const numberFormats = new Map<string, Intl.NumberFormat>();

/**
 * A quantity with its unit, rounded as it is worth. `value` is in the unit the quantity is kept in (rpm, W, Wh, US
 * gpm, US gallons, feet, psi, °C); undefined, null and what is no number come back as a dash without a unit.
 *
 * @example formatQuantity(1400, 'speed', { system: 'us', locale: 'en-US' }) // '1,400 rpm'
 * @example formatQuantity(31, 'flow', { system: 'si', locale: 'en-US' }) // '7.0 m³/h'
 */
export function formatQuantity(value: number | null | undefined, quantity: Quantity, options: FormatOptions): string {
  const { figure, unit } = quantityParts(value, quantity, options);
  return figure === NO_FIGURE ? figure : `${figure} ${unit}`;
}

/**
 * The same as figure and unit apart; the unit is there also where the figure is a dash.
 *
 * @example quantityParts(312, 'power', { system: 'us', locale: 'en-US' }) // { figure: '312', unit: 'W' }
 */
export function quantityParts(
  value: number | null | undefined,
  quantity: Quantity,
  options: FormatOptions,
): QuantityParts {
  const format: QuantityFormat = QUANTITY_FORMATS[quantity][options.system];
  if (value === null || value === undefined || !Number.isFinite(value)) return { figure: NO_FIGURE, unit: format.unit };
  const shown = format.convert(value);
  return { figure: formatNumber(shown, format.decimals(shown), options.locale), unit: format.unit };
}

/**
 * A bare number with a fixed count of decimals; what is no number comes back as a dash.
 *
 * @example formatNumber(1.333, 2, 'en-US') // '1.33'
 */
export function formatNumber(value: number, decimals: number, locale: string): string {
  if (!Number.isFinite(value)) return NO_FIGURE;
  // A small negative would round to "-0", which says nothing.
  const vanishes = Math.abs(value) * 10 ** decimals < 0.5;
  return numberFormat(locale, decimals).format(vanishes ? 0 : value);
}

function numberFormat(locale: string, decimals: number): Intl.NumberFormat {
  const key = `${locale}/${decimals}`;
  const kept = numberFormats.get(key);
  if (kept !== undefined) return kept;
  const digits = { minimumFractionDigits: decimals, maximumFractionDigits: decimals };
  const format = new Intl.NumberFormat(isLocale(locale) ? locale : 'en', digits);
  if (numberFormats.size < 256) numberFormats.set(key, format);
  return format;
}

function isLocale(locale: string): boolean {
  try {
    return Intl.getCanonicalLocales(locale).length === 1;
  } catch {
    return false;
  }
}
