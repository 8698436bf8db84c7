import { describe, expect, it } from 'vitest';
import {
  energyFactor,
  hydraulicHorsepower,
  hydraulicWatts,
  wireToWaterEfficiency,
} from '#shared/domain/hydraulics/hydraulic-power.ts';
import { HI_TABLE } from './sample-wet-ends.ts';

describe('hydraulic power', () => {
  it('takes 0.4477 hp for 60 gpm at 29.52 ft (Appendix C to Subpart Y, constant from memory; computed)', () => {
    expect(hydraulicHorsepower(60, 29.52)).toBeCloseTo(0.4477, 4);
  });

  it.each(HI_TABLE)(
    'agrees with the HI table at %i gpm, %i ft, efficiency %s: %s hp at the shaft',
    (gpm, feet, efficiency, shaft) => {
      // Source: HI Data Tool, edb table-data/pc-data.csv, printed to 0.1 hp and 1 per cent with 3960.
      expect(Math.abs((hydraulicHorsepower(gpm, feet) ?? 0) / efficiency / shaft - 1)).toBeLessThan(0.01);
    },
  );

  it('has an efficiency from wire to water that never passes one', () => {
    expect(wireToWaterEfficiency(60, 29.52, 700)).toBeCloseTo((0.4477 * 745.6999) / 700, 3);
    expect(wireToWaterEfficiency(60, 29.52, 300)).toBeUndefined();
    expect(wireToWaterEfficiency(60, 29.52, 0)).toBeUndefined();
  });

  // Source of the form: ANSI/APSP/ICC-15 2011 as quoted in the HPXML data dictionary; results computed.
  it.each([
    [30, 150, 12],
    [60, 1500, 2.4],
  ])('has an energy factor at %i gpm and %i W of %s', (gpm, watts, factor) => {
    expect(energyFactor(gpm, watts)).toBeCloseTo(factor, 9);
  });

  it('turns 25,000 gallons over with 6.579 kWh at an energy factor of 3.8 (computed)', () => {
    const factor = energyFactor(38, 600) ?? 0;

    expect(factor).toBeCloseTo(3.8, 9);
    expect(25_000 / (1000 * factor)).toBeCloseTo(6.579, 3);
  });

  it.each([Number.NaN, Number.POSITIVE_INFINITY, -1])('answers nothing for %s', (bad) => {
    expect(hydraulicHorsepower(bad, 10)).toBeUndefined();
    expect(hydraulicWatts(10, bad)).toBeUndefined();
    expect(hydraulicHorsepower(10, 10, bad)).toBeUndefined();
    expect(energyFactor(bad, 100)).toBeUndefined();
    expect(energyFactor(10, bad)).toBeUndefined();
    expect(wireToWaterEfficiency(10, 10, bad)).toBeUndefined();
  });
});
