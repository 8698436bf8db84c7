/** Whether each number is finite and above 0. */
const arePositive = (...values: readonly number[]): boolean =>
  values.every((value) => Number.isFinite(value) && value > 0);

/**
 * Hours to turn a pool (US gallons) over once at a flow (gpm): gallons ÷ gpm ÷ 60. undefined unless both are above 0.
 * A turnover is a volume ratio: real pools mix, so it is not "all water filtered".
 *
 * @example turnoverHours(65_000, 240) // 4.514
 * Source: thepoolclass.com, turnover rate.
 */
export const turnoverHours = (poolGallons: number, gpm: number): number | undefined =>
  arePositive(poolGallons, gpm) ? poolGallons / gpm / 60 : undefined;

/**
 * The flow (gpm) that turns a pool (US gallons) over in these minutes. undefined unless both are above 0.
 *
 * @example turnoverGpm(23_936, 360) // 66.49
 */
export const turnoverGpm = (poolGallons: number, minutes: number): number | undefined =>
  arePositive(poolGallons, minutes) ? poolGallons / minutes : undefined;

/**
 * How often a volume of water (US gallons, from 0) turns a pool over. undefined without a pool or for bad input.
 *
 * @example turnovers(43_200, 20_000) // 2.16
 */
export const turnovers = (gallons: number, poolGallons: number): number | undefined =>
  arePositive(poolGallons) && Number.isFinite(gallons) && gallons >= 0 ? gallons / poolGallons : undefined;

/**
 * The largest filtration flow (gpm) of California's rule for a pool (US gallons): volume in 6 h, but 36 gpm at least.
 *
 * @example largestFiltrationGpm(12_960) // 36
 * Source: California Energy Code §150.0(p), as quoted on aquaticmechanicaldesign.com.
 */
export const largestFiltrationGpm = (poolGallons: number): number | undefined =>
  arePositive(poolGallons) ? Math.max(poolGallons / 360, 36) : undefined;
