import { fitWetEnd } from '#shared/domain/hydraulics/fit-wet-end.ts';
import type { WetEndCurve } from '#shared/domain/hydraulics/wet-end-curve.ts';
import type { WetEndSheet } from '#shared/domain/hydraulics/wet-end-sheet.ts';
import { horsepowerToWatts } from '#shared/units/power.ts';

/** An invented pool pump: head and watts on smooth curves, 3450 rpm. */
export const POOL_SHEET: WetEndSheet = {
  referenceRpm: 3450,
  standbyWatts: 8,
  points: [0, 20, 40, 60, 80, 100].map((gpm) => ({
    gpm,
    feet: 84 - 0.05 * gpm - 0.0045 * gpm ** 2,
    watts: 8 + 950 + 12 * gpm - 0.03 * gpm ** 2,
  })),
};

/** HI Data Tool, edb table-data/pc-data.csv: gpm, ft, efficiency, hp at constant speed; its row at zero flow is a trap. */
export const HI_TABLE = [
  [100, 199, 0.25, 20.1],
  [300, 192, 0.5, 29.1],
  [500, 186, 0.65, 36.1],
  [700, 175, 0.75, 41.2],
  [900, 155, 0.78, 45.2],
  [1000, 140, 0.76, 46.5],
  [1100, 125, 0.72, 48.2],
  [1200, 100, 0.65, 46.6],
] as const;

export const HI_SHEET: WetEndSheet = {
  referenceRpm: 1780,
  standbyWatts: 0,
  points: HI_TABLE.map(([gpm, feet, , horsepower]) => ({ gpm, feet, watts: horsepowerToWatts(horsepower) })),
};

export function fitOrFail(sheet: WetEndSheet): WetEndCurve {
  const fit = fitWetEnd(sheet);
  if (!fit.ok) throw new Error(JSON.stringify(fit.refusals));
  return fit.value;
}

/** The pump of HI Data Tool 03_combined: H = 380 − 0.06·Q − 0.0018·Q²; its watts are invented. */
export const HI_COMBINED: WetEndCurve = {
  referenceRpm: 1780,
  head: [380, -0.06, -0.0018],
  power: [10_000, 60],
  standbyWatts: 0,
  lossWatts: 0,
  largestGpm: 400,
  endGpm: 440,
  headSigmaFeet: 1,
  powerSigmaShare: 0.03,
  lossSigmaWatts: 0,
};
