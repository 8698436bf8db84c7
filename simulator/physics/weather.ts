import type { Random } from '#simulator/random.ts';

/** Air temperature of one area: seasons, days, passing fronts, and spells that somebody scripted. */
export type Climate = {
  readonly meanCelsius: number;
  readonly seasonCelsius: number;
  readonly dayCelsius: number;
  readonly frontCelsius: number;
  /** Phases of the fronts, so that two areas do not have the same weather. */
  readonly phases: readonly [number, number, number];
};

/** Warmer or colder than usual from one instant to another, ms; it comes and goes within six hours. */
export type Spell = { readonly from: number; readonly until: number; readonly byCelsius: number };

const DAY_MS = 86_400_000;
const YEAR_MS = 365.2425 * DAY_MS;
const EDGE_MS = 6 * 3_600_000;
const TURN = 2 * Math.PI;

export function createClimate(random: Random, means: Omit<Climate, 'phases'>): Climate {
  return { ...means, phases: [random.next(), random.next(), random.next()] };
}

/** Air temperature, °C. `wallMs` is local wall time, in which the day has its warmest hour at 15:00. */
export function airCelsius(climate: Climate, spells: readonly Spell[], at: number, wallMs: number): number {
  const { phases, frontCelsius } = climate;
  // The coldest day is about 20 January.
  const season = -Math.cos(TURN * (at / YEAR_MS - 20 / 365.2425));
  const day = Math.cos(TURN * (wallMs / DAY_MS - 15 / 24));
  const fronts =
    0.5 * Math.sin(TURN * (at / (3.3 * DAY_MS) + phases[0])) +
    0.3 * Math.sin(TURN * (at / (5.7 * DAY_MS) + phases[1])) +
    0.2 * Math.sin(TURN * (at / (11 * DAY_MS) + phases[2]));
  let celsius = climate.meanCelsius + climate.seasonCelsius * season + climate.dayCelsius * day + frontCelsius * fronts;
  for (const spell of spells) {
    if (at <= spell.from || at >= spell.until) continue;
    celsius += spell.byCelsius * Math.min(1, (at - spell.from) / EDGE_MS, (spell.until - at) / EDGE_MS);
  }
  return celsius;
}
