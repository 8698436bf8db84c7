import type { PumpContext } from '../control/pump-context.ts';
import { type DayTerm, termOn } from '../energy/price-days.ts';
import { DAY_MS } from '../time/local-time.ts';
import { advisePump, type PumpAdvice } from './advise-pump.ts';
import { type CostlyMemory, NO_COSTLY_MEMORY } from './judge-costly-program.ts';

/** What the program of some days cost by; `made` is the advice of one of them, worked out already. */
export type PastTerms = {
  readonly terms: readonly DayTerm[];
  readonly otherKwhByPeriod: readonly number[];
  readonly today: number;
  readonly made: PumpAdvice;
};

/**
 * The month (0 = January) of a local day, counted from 1970.
 *
 * @example monthOfDay(20_270) // 6: the local day is 2025-07-01
 */
export const monthOfDay = (epochDay: number): number => new Date(epochDay * DAY_MS).getUTCMonth();

/**
 * What `costly-program` would remember of days before the advisor first looked at a pump: each by the tariff and the
 * month of its own. The program must have been the present one on all of them. Days of one tariff and month share their
 * advice, which takes up to a second to work out.
 *
 * @example rememberPastDays(context, [20_001, 20_002], { terms, otherKwhByPeriod: [], today: 20_003, made }).days.length // 2
 */
export function rememberPastDays(
  context: PumpContext,
  epochDays: readonly number[],
  { terms, otherKwhByPeriod, today, made }: PastTerms,
): CostlyMemory {
  const keyOf = (day: number): string => `${termOn(terms, day)?.id} ${monthOfDay(day)}`;
  const shares = new Map([[keyOf(today), made.savedShare]]);
  const shareOn = (day: number): number | undefined => {
    const key = keyOf(day);
    if (!shares.has(key)) {
      const tariff = termOn(terms, day)?.tariff;
      shares.set(key, advisePump(context, { tariff, month: monthOfDay(day), otherKwhByPeriod }).savedShare);
    }
    return shares.get(key);
  };
  const days = epochDays.flatMap((day) => {
    const share = shareOn(day);
    return share === undefined ? [] : [[day, Math.round(share * 1000) / 1000] as const];
  });
  return { ...NO_COSTLY_MEMORY, days };
}
