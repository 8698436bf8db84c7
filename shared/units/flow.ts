import { LITRES_PER_GALLON } from './volume.ts';

/**
 * US gallons a minute in cubic metres an hour. Source: 1 gpm = 0.227125 m³/h (HI engineering data).
 *
 * @example gpmToCubicMetresPerHour(1) // 0.227125…
 */
export function gpmToCubicMetresPerHour(gpm: number): number {
  return (gpm * LITRES_PER_GALLON * 60) / 1000;
}

/**
 * Cubic metres an hour in US gallons a minute. Source: 1 m³/h = 4.402868 gpm (HI engineering data).
 *
 * @example cubicMetresPerHourToGpm(1) // 4.402868…
 */
export function cubicMetresPerHourToGpm(cubicMetresPerHour: number): number {
  return (cubicMetresPerHour * 1000) / (LITRES_PER_GALLON * 60);
}

/**
 * US gallons a minute in litres a minute. Source: 1 gpm = 3.785412 L/min (HI engineering data).
 *
 * @example gpmToLitresPerMinute(1) // 3.785411784
 */
export function gpmToLitresPerMinute(gpm: number): number {
  return gpm * LITRES_PER_GALLON;
}

/**
 * Litres a minute in US gallons a minute.
 *
 * @example litresPerMinuteToGpm(3.785411784) // 1
 */
export function litresPerMinuteToGpm(litresPerMinute: number): number {
  return litresPerMinute / LITRES_PER_GALLON;
}
