import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { kilowattHoursToWattHours, wattHoursToKilowattHours } from '#shared/units/energy.ts';
import {
  cubicMetresPerHourToGpm,
  gpmToCubicMetresPerHour,
  gpmToLitresPerMinute,
  litresPerMinuteToGpm,
} from '#shared/units/flow.ts';
import { feetToMetres, metresToFeet } from '#shared/units/length.ts';
import { horsepowerToWatts, wattsToHorsepower, wattsToKilowatts } from '#shared/units/power.ts';
import { feetOfWaterToPsi, kilopascalsToPsi, psiToFeetOfWater, psiToKilopascals } from '#shared/units/pressure.ts';
import { celsiusToFahrenheit, fahrenheitToCelsius } from '#shared/units/temperature.ts';
import { cubicMetresToGallons, gallonsToCubicMetres, gallonsToLitres, litresToGallons } from '#shared/units/volume.ts';

/** The figure to so many significant digits, as a table prints it. */
const printed = (value: number, digits: number): number => Number(value.toPrecision(digits));

describe('conversions', () => {
  // HI engineering data library, unit-conversions table, as printed there.
  it.each([
    ['1 m³/h in gpm', cubicMetresPerHourToGpm(1), 4.402868, 7],
    ['1 m³/h in L/min', gpmToLitresPerMinute(cubicMetresPerHourToGpm(1)), 16.66667, 7],
    ['1 gpm in m³/h', gpmToCubicMetresPerHour(1), 0.227125, 6],
    ['1 gpm in L/min', gpmToLitresPerMinute(1), 3.785412, 7],
    ['1 m³ in US gal', cubicMetresToGallons(1), 264.172, 6],
    ['1 kW in hp', wattsToHorsepower(1000), 1.341022, 7],
    ['1 hp in W', horsepowerToWatts(1), 745.6999, 7],
    ['1 m in ft', metresToFeet(1), 3.28084, 7],
    ['1 atm of 101.325 kPa in psi', kilopascalsToPsi(101.325), 14.6959, 6],
    ['1 atm of 14.6959 psi in ft of water', psiToFeetOfWater(14.6959), 33.9596, 6],
    ['1 psi in ft of water', psiToFeetOfWater(1), 2.3108, 5],
    ['1 psi in kPa (from memory)', psiToKilopascals(1), 6.894757, 7],
    ['1 kPa in ft of water', psiToFeetOfWater(kilopascalsToPsi(1)), 0.33516, 5],
    ['1420 W in kW', wattsToKilowatts(1420), 1.42, 3],
  ])('%s are as published', (_, converted, published, digits) => {
    expect(printed(converted, digits)).toBe(published);
  });

  it('take 40 °F and 4.4 °C for the same freeze limit, as 10 CFR 431.485(d) does', () => {
    expect(printed(fahrenheitToCelsius(40), 2)).toBe(4.4);
    expect(Math.round(celsiusToFahrenheit(4.4))).toBe(40);
    expect(celsiusToFahrenheit(-40)).toBe(-40);
    expect(celsiusToFahrenheit(100)).toBe(212);
  });

  it('undo one another', () => {
    const pairs: [(value: number) => number, (value: number) => number][] = [
      [gpmToCubicMetresPerHour, cubicMetresPerHourToGpm],
      [gpmToLitresPerMinute, litresPerMinuteToGpm],
      [gallonsToLitres, litresToGallons],
      [gallonsToCubicMetres, cubicMetresToGallons],
      [feetToMetres, metresToFeet],
      [psiToKilopascals, kilopascalsToPsi],
      [psiToFeetOfWater, feetOfWaterToPsi],
      [celsiusToFahrenheit, fahrenheitToCelsius],
      [horsepowerToWatts, wattsToHorsepower],
      [wattHoursToKilowattHours, kilowattHoursToWattHours],
    ];
    fc.assert(
      fc.property(
        fc.constantFrom(...pairs),
        fc.double({ min: -1e6, max: 1e6, noNaN: true }),
        ([there, back], value) => {
          expect(back(there(value))).toBeCloseTo(value, 6);
        },
      ),
    );
  });
});
