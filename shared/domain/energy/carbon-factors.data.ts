/**
 * What a kWh emits. `average` is the output rate of all plants, for what is used; `non-baseload` that of the plants
 * that a saving holds back. Show the year, and CO2 or CO2e as it is.
 */
export type CarbonFactor = {
  readonly region: string;
  readonly year: number;
  readonly gas: 'CO2' | 'CO2e';
  readonly rate: 'average' | 'non-baseload';
  readonly kilogramsPerKwh: number;
};

/** The international pound, exact, over a thousand kWh. */
const perMegawattHour = (pounds: number): number => (pounds * 0.45359237) / 1000;

const factor = (
  region: string,
  year: number,
  gas: CarbonFactor['gas'],
  rate: CarbonFactor['rate'],
  poundsPerMwh: number,
): CarbonFactor => ({ region, year, gas, rate, kilogramsPerKwh: perMegawattHour(poundsPerMwh) });

/**
 * Emission factors of the US grid. Sources: eGRID2022 and eGRID2023 US averages as quoted by public repositories;
 * subregions of eGRID2022 from a copy of EPA's page (its first
 * column, printed as baseload there, is the total output rate: from memory).
 */
export const CARBON_FACTORS: readonly CarbonFactor[] = [
  factor('US', 2022, 'CO2', 'average', 823.1),
  factor('US', 2023, 'CO2e', 'average', 770.9),
  factor('AKGD', 2022, 'CO2', 'average', 1052.1),
  factor('AKGD', 2022, 'CO2', 'non-baseload', 1224.5),
  factor('AKMS', 2022, 'CO2', 'average', 495.8),
  factor('AKMS', 2022, 'CO2', 'non-baseload', 1587.9),
  factor('AZNM', 2022, 'CO2', 'average', 776.0),
  factor('AZNM', 2022, 'CO2', 'non-baseload', 1205.2),
];
