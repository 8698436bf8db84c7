/** One mechanical horsepower, W. Source: 1 kW = 1.341022 hp, 1 hp = 745.6999 W (HI engineering data). */
const WATTS_PER_HORSEPOWER = 745.6998715822702;

/**
 * Watts in kilowatts.
 *
 * @example wattsToKilowatts(1420) // 1.42
 */
export function wattsToKilowatts(watts: number): number {
  return watts / 1000;
}

/**
 * Watts in mechanical horsepower.
 *
 * @example wattsToHorsepower(1000) // 1.341022…
 */
export function wattsToHorsepower(watts: number): number {
  return watts / WATTS_PER_HORSEPOWER;
}

/**
 * Mechanical horsepower in watts.
 *
 * @example horsepowerToWatts(1) // 745.6999
 */
export function horsepowerToWatts(horsepower: number): number {
  return horsepower * WATTS_PER_HORSEPOWER;
}
