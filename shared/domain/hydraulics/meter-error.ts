/** One standard deviation of a watt reading: a share of it plus a fixed part. */
export type MeterError = { readonly share: number; readonly watts: number };

/** As fitted, before anybody held a clamp meter to it. */
export const METER_AS_FITTED: MeterError = { share: 0.05, watts: 5 };
/** Once checked with a clamp meter at start-up. */
export const METER_CHECKED: MeterError = { share: 0.02, watts: 2 };

/** One sigma of a reading, in watts. @example meterSigmaWatts(METER_AS_FITTED, 1000) // 55 */
export const meterSigmaWatts = (meter: MeterError, watts: number): number =>
  meter.share * Math.abs(watts) + meter.watts;
