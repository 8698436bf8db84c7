import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { formatNumber, formatQuantity, NO_FIGURE, quantityParts } from '#shared/units/format-quantity.ts';
import { QUANTITY_FORMATS, type Quantity } from '#shared/units/quantity-formats.data.ts';
import { UNIT_SYSTEMS } from '#shared/units/unit-system.ts';

const US = { system: 'us', locale: 'en-US' } as const;
const SI = { system: 'si', locale: 'en-US' } as const;
const QUANTITIES = Object.keys(QUANTITY_FORMATS) as Quantity[];

describe('a quantity', () => {
  it.each<[number, Quantity, string, string]>([
    [1400, 'speed', '1,400 rpm', '1,400 rpm'],
    [1234.5, 'power', '1,235 W', '1,235 W'],
    [1840, 'energy', '1.84 kWh', '1.84 kWh'],
    [18_400, 'energy', '18.4 kWh', '18.4 kWh'],
    [336_400, 'energy', '336 kWh', '336 kWh'],
    [31, 'flow', '31 gpm', '7.0 m³/h'],
    [8.25, 'flow', '8.3 gpm', '1.9 m³/h'],
    [24_000, 'volume', '24,000 gal', '90.8 m³'],
    [42.3, 'head', '42 ft', '12.9 m'],
    [20, 'pressure', '20 psi', '138 kPa'],
    [4.4, 'temperature', '40 °F', '4.4 °C'],
  ])('of %d (%s) is written with its unit, in either system', (value, quantity, us, si) => {
    expect(formatQuantity(value, quantity, US)).toBe(us);
    expect(formatQuantity(value, quantity, SI)).toBe(si);
  });

  it('takes the separators of the locale, and English where there is no such locale', () => {
    expect(formatQuantity(1400, 'speed', { system: 'si', locale: 'de-DE' })).toBe('1.400 rpm');
    expect(formatQuantity(1400, 'speed', { system: 'si', locale: 'no such locale' })).toBe('1,400 rpm');
  });

  it('that is unknown or no number is a dash, with its unit apart', () => {
    for (const value of [undefined, null, Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(formatQuantity(value, 'flow', US)).toBe(NO_FIGURE);
      expect(quantityParts(value, 'flow', US)).toEqual({ figure: NO_FIGURE, unit: 'gpm' });
    }
  });

  it('never shows a minus before nothing', () => {
    expect(formatQuantity(-0.4, 'power', US)).toBe('0 W');
    expect(formatNumber(-0.004, 2, 'en-US')).toBe('0.00');
    expect(formatNumber(-0.6, 0, 'en-US')).toBe('-1');
  });

  it('never shows what is no number, whatever it is', () => {
    const options = fc.record({
      system: fc.constantFrom(...UNIT_SYSTEMS),
      locale: fc.constantFrom('en-US', 'de-DE', 'es-MX', ''),
    });
    fc.assert(
      fc.property(fc.double(), fc.constantFrom(...QUANTITIES), options, (value, quantity, given) => {
        expect(formatQuantity(value, quantity, given)).not.toMatch(/NaN|∞|undefined/);
      }),
    );
  });
});
