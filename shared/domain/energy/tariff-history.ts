import type { Refusal } from '../refusal/refusal.ts';
import { checkTariff, type TariffFault } from './check-tariff.ts';
import type { Tariff } from './tariff.ts';

/** A tariff and the half-open stretch (ms) it was in force; the last one has no end. */
export type TariffTerm = { readonly from: number; readonly to: number | undefined; readonly tariff: Tariff };

export type TermFault =
  | TariffFault
  | 'hole-between-terms'
  | 'terms-overlap'
  | 'ends-before-it-starts'
  | 'not-an-instant';

/**
 * Every fault of the tariffs that a pad has had, in order: the faults of each one, a stretch of time without a tariff
 * between two of them, two at one time.
 *
 * @example checkTariffTerms([{ from: 0, to: 10, tariff }, { from: 12, to: undefined, tariff }])[0]?.reason // 'hole-between-terms'
 */
export function checkTariffTerms(terms: readonly TariffTerm[]): Refusal<TermFault>[] {
  return terms.flatMap(({ from, to, tariff }, index) => {
    const at = `terms[${index}]`;
    const faults: Refusal<TermFault>[] = checkTariff(tariff).map((one) => ({
      ...one,
      field: `${at}.tariff.${one.field}`,
    }));
    if (!Number.isFinite(from) || (to !== undefined && !Number.isFinite(to)))
      faults.push({ reason: 'not-an-instant', field: at, allowed: 'finite instants (ms)' });
    if (to !== undefined && to <= from)
      faults.push({ reason: 'ends-before-it-starts', field: `${at}.to`, allowed: 'an instant after its from' });
    const next = terms[index + 1];
    if (next === undefined || to === next.from) return faults;
    const reason = to !== undefined && to < next.from ? 'hole-between-terms' : 'terms-overlap';
    return [
      ...faults,
      { reason, field: `terms[${index + 1}].from`, allowed: 'the instant at which the term before it ends' },
    ];
  });
}

/** The tariff in force at an instant (ms); undefined before the first term and after the last. */
export const findTariff = (terms: readonly TariffTerm[], at: number): Tariff | undefined =>
  terms.find((term) => at >= term.from && (term.to === undefined || at < term.to))?.tariff;
