import { createHash } from 'node:crypto';
import type { Baseline } from '#shared/domain/energy/savings-baseline.ts';
import { epochDayOf, nextMonth } from './day-text.ts';
import type { PadPrices } from './tariffs-in-force.ts';

/** To be raised when the domain prices the same hours otherwise: every stored price is worked out anew then. */
const PRICING = 1;

type Priced = Pick<PadPrices, 'terms' | 'otherKwhByPeriod'>;

/**
 * Names what a calendar month of a pump is priced by: its zone and the tariffs in force within it, by their content. A
 * stored price with another name is out of date, whoever changed what; a tariff of next year leaves last year's as it is.
 *
 * @example createPriceKeys('America/Phoenix', prices)('2025-07-01') // 'kZ2mXl…', the same in the worker and in a request
 */
export function createPriceKeys(zone: string, { terms, otherKwhByPeriod }: Priced): (month: string) => string {
  const named = terms.map((term) => ({ ...term, content: digest([term.id, term.tariff]) }));
  const known = new Map<string, string>();
  const keyOf = (month: string): string => {
    const [first, end] = [epochDayOf(month), epochDayOf(nextMonth(month))];
    const met = named.flatMap(({ fromDay = -Infinity, toDay = Infinity, content }) =>
      fromDay < end && toDay > first ? [[content, Math.max(fromDay, first), Math.min(toDay, end)]] : [],
    );
    return digest([PRICING, zone, otherKwhByPeriod, met]);
  };
  return (month) => {
    const key = known.get(month) ?? keyOf(month);
    known.set(month, key);
    return key;
  };
}

/** To be raised when the domain compares the same hours otherwise. */
const COMPARING = 1;

/**
 * Names what a calendar month of a pump was compared by: its prices and its baseline, by content.
 *
 * @example createCompareKeys(createPriceKeys(zone, prices), baseline)('2025-07-01') // 'p0Qd…'
 */
export const createCompareKeys =
  (keyOf: (month: string) => string, baseline: Baseline): ((month: string) => string) =>
  (month) =>
    digest([COMPARING, keyOf(month), baseline]);

const digest = (content: unknown): string =>
  createHash('sha256').update(JSON.stringify(content)).digest('base64url').slice(0, 22);
