import { apportionMinorUnits, type Micros } from '#shared/domain/energy/money.ts';

type Money = { readonly minorUnits: number; readonly currency: string };

/**
 * Whole cents of parts that add up to a sum which was settled in parts of its own (months, pumps): by largest remainder,
 * and what the sum is a cent or so off then is the largest part's. Undefined for a currency that is not known, or no parts.
 */
export function shareCents(micros: readonly Micros[], { minorUnits, currency }: Money): number[] | undefined {
  const shares = apportionMinorUnits(micros, currency);
  if (shares === undefined || shares.length === 0) return undefined;
  const rest = minorUnits - shares.reduce((sum, units) => sum + units, 0);
  const largest = shares.indexOf(Math.max(...shares));
  return shares.map((units, index) => (index === largest ? units + rest : units));
}
