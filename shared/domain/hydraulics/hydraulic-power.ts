import { horsepowerToWatts } from '#shared/units/power.ts';

/**
 * US gallons a minute times feet of water, per horsepower. 3956 as in the US pool-pump test procedure (from memory);
 * handbooks also print 3960, 0.10 % apart. Millrace uses 3956 everywhere and mixes neither.
 */
export const GPM_FEET_PER_HORSEPOWER = 3956;

/**
 * Hydraulic power in horsepower from flow (gpm) and head (ft): Q·H·SG ÷ 3956. undefined unless all are finite and
 * from 0 (specific gravity above 0).
 *
 * @example hydraulicHorsepower(60, 29.52) // 0.4477
 * Source: US pool-pump test procedure, 10 CFR 431 Subpart Y, Appendix C (constant from memory).
 */
export function hydraulicHorsepower(gpm: number, feet: number, specificGravity = 1): number | undefined {
  if (![gpm, feet, specificGravity].every(Number.isFinite) || gpm < 0 || feet < 0 || specificGravity <= 0)
    return undefined;
  return (gpm * feet * specificGravity) / GPM_FEET_PER_HORSEPOWER;
}

/** Hydraulic power in watts; bad input as `hydraulicHorsepower`. @example hydraulicWatts(60, 29.52) // 333.9 */
export function hydraulicWatts(gpm: number, feet: number, specificGravity = 1): number | undefined {
  const horsepower = hydraulicHorsepower(gpm, feet, specificGravity);
  return horsepower === undefined ? undefined : horsepowerToWatts(horsepower);
}

/**
 * Wire-to-water efficiency, 0 to 1: hydraulic watts over watts at the line terminals. undefined for bad input, for no
 * watts, and where the water would take more than the wire gives (the readings contradict each other).
 *
 * @example wireToWaterEfficiency(60, 29.52, 700) // 0.477
 */
export function wireToWaterEfficiency(gpm: number, feet: number, watts: number): number | undefined {
  const water = hydraulicWatts(gpm, feet);
  if (water === undefined || !Number.isFinite(watts) || watts <= 0 || water > watts) return undefined;
  return water / watts;
}

/**
 * Energy factor, gallons per watt-hour (the same figure as thousands of gallons per kWh): gpm × 60 ÷ W. undefined for
 * bad input or no watts.
 *
 * @example energyFactor(30, 150) // 12
 * Source: ANSI/APSP/ICC-15 2011 as quoted in the HPXML data dictionary, PoolPump/EnergyFactor.
 */
export function energyFactor(gpm: number, watts: number): number | undefined {
  if (!Number.isFinite(gpm) || !Number.isFinite(watts) || gpm < 0 || watts <= 0) return undefined;
  return (gpm * 60) / watts;
}
