import { CARBON_FACTORS, type CarbonFactor } from './carbon-factors.data.ts';

/** What the energy stands for: consumption takes the average rate, savings the non-baseload one. */
export type CarbonPurpose = 'consumption' | 'savings';

export type CarbonAmount = { readonly kilograms: number; readonly factor: CarbonFactor };

const RATE_FOR = { consumption: 'average', savings: 'non-baseload' } as const satisfies Record<
  CarbonPurpose,
  CarbonFactor['rate']
>;

/**
 * The latest factor known for a region and purpose. undefined where there is none: the average rate never stands in for
 * savings, nor one region for another.
 *
 * @example findCarbonFactor('US', 'consumption')?.year // 2023
 */
export function findCarbonFactor(
  region: string,
  purpose: CarbonPurpose,
  factors: readonly CarbonFactor[] = CARBON_FACTORS,
): CarbonFactor | undefined {
  return factors
    .filter((factor) => factor.region === region && factor.rate === RATE_FOR[purpose])
    .reduce<CarbonFactor | undefined>(
      (latest, factor) => (latest === undefined || factor.year > latest.year ? factor : latest),
      undefined,
    );
}

/**
 * What an amount of energy (kWh; savings may be below 0) emits, in kilograms, with the factor used and so its year.
 * undefined where the factor's rate is not the one for this purpose, or for bad numbers.
 *
 * @example carbonOf(1000, 'consumption', factor) // { kilograms: 349.67, factor: { year: 2023, gas: 'CO2e', … } }
 * Source: EPA: output (average) rate for consumption, non-baseload (marginal) for savings.
 */
export function carbonOf(kwh: number, purpose: CarbonPurpose, factor: CarbonFactor): CarbonAmount | undefined {
  const sound = Number.isFinite(kwh) && Number.isFinite(factor.kilogramsPerKwh) && factor.kilogramsPerKwh >= 0;
  if (!sound || factor.rate !== RATE_FOR[purpose] || (purpose === 'consumption' && kwh < 0)) return undefined;
  return { kilograms: kwh * factor.kilogramsPerKwh, factor };
}
