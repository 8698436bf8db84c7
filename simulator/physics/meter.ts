import type { Random } from '#simulator/random.ts';

/** The error of one device's watt meter: fixed for the device, until somebody checks it with a clamp. */
export type Meter = { readonly gain: number; readonly offsetWatts: number };

/** Within 5 % and 5 W, as such meters come. */
export function createMeter(random: Random): Meter {
  return { gain: 1 + random.between(-0.05, 0.05), offsetWatts: random.between(-5, 5) };
}

/** What the meter shows for true watts, to a tenth of a watt, never below 0. */
export function meterWatts(meter: Meter, watts: number, noise: number): number {
  const shown = watts * meter.gain * (1 + noise) + meter.offsetWatts;
  return shown <= 0 ? 0 : Math.round(shown * 10) / 10;
}
