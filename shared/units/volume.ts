/** One US gallon is 231 cubic inches, so exactly this many litres. Imperial gallons appear nowhere. */
export const LITRES_PER_GALLON = 3.785411784;

/**
 * US gallons in litres.
 *
 * @example gallonsToLitres(1) // 3.785411784
 */
export function gallonsToLitres(gallons: number): number {
  return gallons * LITRES_PER_GALLON;
}

/**
 * Litres in US gallons.
 *
 * @example litresToGallons(3.785411784) // 1
 */
export function litresToGallons(litres: number): number {
  return litres / LITRES_PER_GALLON;
}

/**
 * US gallons in cubic metres.
 *
 * @example gallonsToCubicMetres(264.172) // 1.0000…
 */
export function gallonsToCubicMetres(gallons: number): number {
  return (gallons * LITRES_PER_GALLON) / 1000;
}

/**
 * Cubic metres in US gallons. Source: 1 m³ = 264.1720 US gal (HI engineering data).
 *
 * @example cubicMetresToGallons(1) // 264.172…
 */
export function cubicMetresToGallons(cubicMetres: number): number {
  return (cubicMetres * 1000) / LITRES_PER_GALLON;
}
