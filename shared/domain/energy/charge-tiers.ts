import type { Micros } from './money.ts';
import type { RateTier } from './tariff.ts';

const upperBound = (tier: RateTier, days: number): number =>
  tier.upTo === undefined ? Number.POSITIVE_INFINITY : tier.upTo * (tier.perDay === true ? days : 1);

/**
 * What a month's use of one period costs in micros: each part of the amount (kWh or kW, from 0) at the price of its
 * tier, plus `extraMicros` on all of it. `days` is the length of the month, for tiers that are given per day.
 *
 * @example chargeTiers([{ rateMicros: 100_000, adjustmentMicros: 0, upTo: 300 }, { rateMicros: 200_000, adjustmentMicros: 0 }], 500, 30)
 * // 70_000_000: 300 kWh at 0.10 and 200 kWh at 0.20
 * Source: r1·min(kWh, T) + r2·max(kWh − T, 0), and the open rate-schedule shape: price = rate + adj.
 */
export function chargeTiers(tiers: readonly RateTier[], amount: number, days: number, extraMicros = 0): Micros {
  let [charged, below] = [0, 0];
  for (const tier of tiers) {
    const top = Math.min(amount, upperBound(tier, days));
    if (top > below) charged += (top - below) * (tier.rateMicros + tier.adjustmentMicros + extraMicros);
    below = Math.max(below, top);
  }
  return charged;
}

/**
 * The price in micros of the next kWh (or kW) once a month's use has reached an amount.
 *
 * @example marginalMicros([{ rateMicros: 100_000, adjustmentMicros: 0, upTo: 300 }, { rateMicros: 200_000, adjustmentMicros: 0 }], 300, 30) // 200_000
 */
export function marginalMicros(tiers: readonly RateTier[], amount: number, days: number): Micros {
  const tier = tiers.find((one) => amount < upperBound(one, days)) ?? tiers.at(-1);
  return tier === undefined ? 0 : tier.rateMicros + tier.adjustmentMicros;
}
