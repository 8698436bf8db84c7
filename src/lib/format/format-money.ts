import { NO_FIGURE } from '#shared/units/format-quantity.ts';

const formats = new Map<string, Intl.NumberFormat>();

const formatFor = (currency: string, locale: string, fine: boolean): Intl.NumberFormat => {
  const key = `${currency} ${locale} ${fine}`;
  const made =
    formats.get(key) ??
    new Intl.NumberFormat(locale, { style: 'currency', currency, ...(fine ? { maximumFractionDigits: 5 } : {}) });
  formats.set(key, made);
  return made;
};

/**
 * An amount of money, given as decimal text and never made a binary fraction on its way. `fine` keeps tenths of a cent:
 * prices of a kWh.
 *
 * @example formatMoney('1234.5', 'USD', 'en-US') // '$1,234.50'
 * @example formatMoney('0.31245', 'USD', 'en-US', true) // '$0.31245'
 */
export function formatMoney(
  amount: string | null | undefined,
  currency: string | null,
  locale: string,
  fine = false,
): string {
  if (amount === null || amount === undefined || currency === null) return NO_FIGURE;
  // Formats decimal text digit by digit (ECMA-402, 2023); its type does not know yet.
  return formatFor(currency, locale, fine).format(amount as unknown as number);
}
