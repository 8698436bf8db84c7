/** A shaft at or below this speed, rpm, stands: it is nothing that a motor can be set to. */
export const STANDSTILL_RPM = 40;

/**
 * How far a measured speed may lie from an expected one and still be that speed, rpm: 40 or 2 %, whichever is more.
 * Common practice in the trade, no source.
 *
 * @example speedTolerance(3000) // 60
 */
export function speedTolerance(rpm: number): number {
  return Math.max(40, rpm * 0.02);
}

/**
 * Whether a measured speed is an expected one, both in rpm. False where either is no number.
 *
 * @example fitsSpeed(2810, 2850) // true
 */
export function fitsSpeed(measuredRpm: number, expectedRpm: number): boolean {
  return Math.abs(measuredRpm - expectedRpm) <= speedTolerance(expectedRpm);
}
