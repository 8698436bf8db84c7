/** The international foot, m: exact. */
const METRES_PER_FOOT = 0.3048;

/**
 * Feet in metres; also feet of head in metres of head.
 *
 * @example feetToMetres(10) // 3.048
 */
export function feetToMetres(feet: number): number {
  return feet * METRES_PER_FOOT;
}

/**
 * Metres in feet. Source: 1 m = 3.280840 ft (HI engineering data).
 *
 * @example metresToFeet(1) // 3.28084
 */
export function metresToFeet(metres: number): number {
  return metres / METRES_PER_FOOT;
}
