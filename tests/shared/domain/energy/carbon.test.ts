import { describe, expect, it } from 'vitest';
import { carbonOf, findCarbonFactor } from '#shared/domain/energy/carbon.ts';
import { CARBON_FACTORS } from '#shared/domain/energy/carbon-factors.data.ts';

describe('carbon', () => {
  it('takes the latest average rate for consumption (eGRID2023 US, 770.9 lb CO2e/MWh, a public repository quoting it)', () => {
    const factor = findCarbonFactor('US', 'consumption');
    if (factor === undefined) throw new Error('must be known');

    expect(factor).toMatchObject({ year: 2023, gas: 'CO2e', rate: 'average' });
    expect(factor.kilogramsPerKwh).toBeCloseTo(0.34967, 4);
    expect(carbonOf(1000, 'consumption', factor)?.kilograms).toBeCloseTo(349.67, 1);
  });

  it('takes the non-baseload rate for savings (eGRID2022 AZNM, 1205.2 lb/MWh, a copy of EPA’s page)', () => {
    const factor = findCarbonFactor('AZNM', 'savings');
    if (factor === undefined) throw new Error('must be known');

    expect(factor).toMatchObject({ year: 2022, rate: 'non-baseload' });
    expect(carbonOf(100, 'savings', factor)?.kilograms).toBeCloseTo(0.45359237 * 120.52, 6);
  });

  it('never lets the average stand in for savings, nor one region for another', () => {
    const average = findCarbonFactor('US', 'consumption');

    expect(findCarbonFactor('US', 'savings')).toBeUndefined();
    expect(findCarbonFactor('ZZZZ', 'consumption')).toBeUndefined();
    expect(average && carbonOf(100, 'savings', average)).toBeUndefined();
  });

  it('reads 0.37335 kg CO2/kWh for the US of 2022 (823.1 lb/MWh, several public repositories quoting it)', () => {
    const factor = CARBON_FACTORS.find(({ region, year }) => region === 'US' && year === 2022);

    expect(factor?.kilogramsPerKwh).toBeCloseTo(0.37335, 4);
    expect(factor?.gas).toBe('CO2');
  });

  it.each([Number.NaN, Number.POSITIVE_INFINITY, -1])('gives nothing for %s kWh used', (kwh) => {
    const factor = findCarbonFactor('US', 'consumption');

    expect(factor && carbonOf(kwh, 'consumption', factor)).toBeUndefined();
  });
});
