/** One pound-force a square inch, kPa. Source: 6.894757 (from memory), from the pound, the inch and standard gravity. */
const KILOPASCALS_PER_PSI = 6.894757293168361;
/** Feet of water at 20 °C to the psi. Source: 33.9596 ft and 14.6959 psi to the atmosphere (HI engineering data). */
const FEET_OF_WATER_PER_PSI = 33.9596 / 14.6959;

/**
 * Pounds a square inch in kilopascals.
 *
 * @example psiToKilopascals(20) // 137.895…
 */
export function psiToKilopascals(psi: number): number {
  return psi * KILOPASCALS_PER_PSI;
}

/**
 * Kilopascals in pounds a square inch.
 *
 * @example kilopascalsToPsi(101.325) // 14.6959…
 */
export function kilopascalsToPsi(kilopascals: number): number {
  return kilopascals / KILOPASCALS_PER_PSI;
}

/**
 * Pounds a square inch in feet of water at 20 °C.
 *
 * @example psiToFeetOfWater(10) // 23.108…
 */
export function psiToFeetOfWater(psi: number): number {
  return psi * FEET_OF_WATER_PER_PSI;
}

/**
 * Feet of water at 20 °C in pounds a square inch.
 *
 * @example feetOfWaterToPsi(23.108) // 10.0000…
 */
export function feetOfWaterToPsi(feet: number): number {
  return feet / FEET_OF_WATER_PER_PSI;
}
