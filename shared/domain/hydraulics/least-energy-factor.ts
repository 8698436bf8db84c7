export const PUMP_CLASSES = ['self-priming', 'non-self-priming', 'pressure-cleaner-booster'] as const;
export type PumpClass = (typeof PUMP_CLASSES)[number];

/** Above this hydraulic horsepower the rule does not apply. Source: energy.ca.gov, dedicated-purpose pool pumps. */
const LARGEST_HORSEPOWER = 2.5;

/**
 * The least weighted energy factor (thousands of gallons per kWh) that US rules ask of pumps made from 19 Jul 2021, by
 * class and hydraulic horsepower at top speed on curve C (0 to under 2.5). undefined outside the rule and for bad
 * input. The jump at 0.711 hp is meant: above it only variable speed passes.
 *
 * @example leastEnergyFactor('self-priming', 1) // 6.59
 * Source: 10 CFR 431.465(f); self-priming as quoted on casetext.com, booster as quoted from eCFR; non-self-priming
 * from memory.
 */
export function leastEnergyFactor(pumpClass: PumpClass, horsepower: number): number | undefined {
  if (!Number.isFinite(horsepower) || horsepower < 0 || horsepower >= LARGEST_HORSEPOWER) return undefined;
  if (pumpClass === 'pressure-cleaner-booster') return 0.42;
  if (pumpClass === 'non-self-priming') return horsepower <= 0.13 ? 4.6 : -0.85 * Math.log(horsepower) + 2.87;
  if (horsepower <= 0.13) return 5.55;
  return horsepower < 0.711 ? -1.3 * Math.log(horsepower) + 2.9 : -2.3 * Math.log(horsepower) + 6.59;
}
