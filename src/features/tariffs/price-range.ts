import type { TariffShape } from '#shared/contract/http/tariffs.ts';
import { formatMicros, parseMoney } from '#shared/domain/energy/money-text.ts';

/** The cheapest and the dearest kWh of a tariff, without what months add. */
export function priceRange({ energy }: Pick<TariffShape, 'energy'>): { readonly least: string; readonly most: string } {
  const prices = energy.periods.flatMap((tiers) =>
    tiers.map(({ rate, adjustment }) => (parseMoney(rate) ?? 0) + (parseMoney(adjustment) ?? 0)),
  );
  return { least: formatMicros(Math.min(...prices)), most: formatMicros(Math.max(...prices)) };
}
