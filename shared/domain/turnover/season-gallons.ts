/**
 * The water (US gallons) to move a day in a month (0 = January): the season's turnovers a day, given for each of the
 * twelve months, times the pool's volume. undefined for a month that is none, a pool that is not above 0, or turnovers
 * that are negative or not finite.
 *
 * @example seasonGallons([0.5, 0.5, 0.7, 1, 1, 1.2, 1.5, 1.5, 1.2, 1, 0.7, 0.5], 20_000, 6) // 30_000
 */
export function seasonGallons(
  turnoversByMonth: readonly number[],
  poolGallons: number,
  month: number,
): number | undefined {
  const turnovers = turnoversByMonth[month];
  if (turnovers === undefined || turnoversByMonth.length !== 12) return undefined;
  if (!(turnovers >= 0 && poolGallons > 0) || !Number.isFinite(turnovers * poolGallons)) return undefined;
  return turnovers * poolGallons;
}
