/**
 * Watt-hours in kilowatt-hours.
 *
 * @example wattHoursToKilowattHours(1840) // 1.84
 */
export function wattHoursToKilowattHours(wattHours: number): number {
  return wattHours / 1000;
}

/**
 * Kilowatt-hours in watt-hours.
 *
 * @example kilowattHoursToWattHours(1.84) // 1840
 */
export function kilowattHoursToWattHours(kilowattHours: number): number {
  return kilowattHours * 1000;
}
