import { feetFromPsi } from './head-from-gauges.ts';
import { WATER_VAPOUR_PSIA } from './water-vapour.data.ts';

/** Everything in feet of the pumped water; a lift is a static head under 0. */
export type SuctionSide = {
  readonly atmosphereFeet: number;
  readonly staticFeet: number;
  readonly vapourFeet: number;
  readonly lossFeet: number;
};

/**
 * Net positive suction head available, ft: atmosphere + static − vapour pressure − losses. undefined unless all are
 * finite, and atmosphere, vapour pressure and losses from 0. A result under 0 means that the water boils.
 *
 * @example netPositiveSuctionHead({ atmosphereFeet: 33.9, staticFeet: 6, vapourFeet: 0.839, lossFeet: 4 }) // 35.061
 * Source: HI Data Tool, 04: NPSHA = h_atm + h_s − h_vp.
 */
export function netPositiveSuctionHead(side: SuctionSide): number | undefined {
  const { atmosphereFeet, staticFeet, vapourFeet, lossFeet } = side;
  if (![atmosphereFeet, staticFeet, vapourFeet, lossFeet].every(Number.isFinite)) return undefined;
  if (atmosphereFeet < 0 || vapourFeet < 0 || lossFeet < 0) return undefined;
  return atmosphereFeet + staticFeet - vapourFeet - lossFeet;
}

/**
 * Vapour pressure of water (ft) at 60 to 100 °F, between the table's rows on a logarithmic scale. undefined outside.
 *
 * @example vapourPressureFeet(70) // 0.84
 */
export function vapourPressureFeet(fahrenheit: number): number | undefined {
  const above = WATER_VAPOUR_PSIA.findIndex(([degrees]) => degrees >= fahrenheit);
  const upper = WATER_VAPOUR_PSIA[above];
  const lower = WATER_VAPOUR_PSIA[above - 1] ?? upper;
  if (upper === undefined || lower === undefined || !(fahrenheit >= lower[0])) return undefined;
  const share = upper[0] === lower[0] ? 0 : (fahrenheit - lower[0]) / (upper[0] - lower[0]);
  return feetFromPsi(lower[1] ** (1 - share) * upper[1] ** share);
}

/**
 * The air's pressure (ft of water) at an altitude of -1,000 to 15,000 ft. undefined outside.
 *
 * @example atmosphereFeet(7000) // 26.2
 * Source: standard atmosphere, 33.9 ft at sea level (from memory), checked against 26.2 ft at 7,000 ft.
 */
export function atmosphereFeet(altitudeFeet: number): number | undefined {
  if (!(altitudeFeet >= -1000 && altitudeFeet <= 15_000)) return undefined;
  return 33.9 * (1 - 6.8754e-6 * altitudeFeet) ** 5.2559;
}
