import { wattHoursToKilowattHours } from './energy.ts';
import { gpmToCubicMetresPerHour } from './flow.ts';
import { feetToMetres } from './length.ts';
import { psiToKilopascals } from './pressure.ts';
import { celsiusToFahrenheit } from './temperature.ts';
import type { UnitSystem } from './unit-system.ts';
import { gallonsToCubicMetres } from './volume.ts';

/** How one quantity is shown: from the unit it is kept in to `unit`, with so many decimals for the converted value. */
export type QuantityFormat = {
  readonly unit: string;
  readonly convert: (kept: number) => number;
  readonly decimals: (shown: number) => number;
};

const same = (kept: number): number => kept;
const whole = (): number => 0;
const oneDecimal = (): number => 1;
/** One decimal where a whole number would hide a tenth of the value or more. */
const oneBelowTen = (shown: number): number => (Math.abs(shown) < 9.95 ? 1 : 0);
/** Three figures below a thousand. */
const threeFigures = (shown: number): number => (Math.abs(shown) < 9.995 ? 2 : Math.abs(shown) < 99.95 ? 1 : 0);

/** Kept in rpm, W, Wh, US gpm, US gallons, feet (of head, or of pipe), psi and °C. */
export const QUANTITY_FORMATS = {
  speed: {
    us: { unit: 'rpm', convert: same, decimals: whole },
    si: { unit: 'rpm', convert: same, decimals: whole },
  },
  power: {
    us: { unit: 'W', convert: same, decimals: whole },
    si: { unit: 'W', convert: same, decimals: whole },
  },
  energy: {
    us: { unit: 'kWh', convert: wattHoursToKilowattHours, decimals: threeFigures },
    si: { unit: 'kWh', convert: wattHoursToKilowattHours, decimals: threeFigures },
  },
  flow: {
    us: { unit: 'gpm', convert: same, decimals: oneBelowTen },
    si: { unit: 'm³/h', convert: gpmToCubicMetresPerHour, decimals: oneDecimal },
  },
  volume: {
    us: { unit: 'gal', convert: same, decimals: whole },
    si: { unit: 'm³', convert: gallonsToCubicMetres, decimals: oneDecimal },
  },
  head: {
    us: { unit: 'ft', convert: same, decimals: oneBelowTen },
    si: { unit: 'm', convert: feetToMetres, decimals: oneDecimal },
  },
  length: {
    us: { unit: 'ft', convert: same, decimals: oneBelowTen },
    si: { unit: 'm', convert: feetToMetres, decimals: oneDecimal },
  },
  pressure: {
    us: { unit: 'psi', convert: same, decimals: oneBelowTen },
    si: { unit: 'kPa', convert: psiToKilopascals, decimals: whole },
  },
  temperature: {
    us: { unit: '°F', convert: celsiusToFahrenheit, decimals: whole },
    si: { unit: '°C', convert: same, decimals: oneDecimal },
  },
} as const satisfies Record<string, Record<UnitSystem, QuantityFormat>>;

export type Quantity = keyof typeof QUANTITY_FORMATS;
