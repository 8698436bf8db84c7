import { aimDriveHeat } from './physics/drive-heat.ts';
import { dutyGpm } from './physics/duty-point.ts';
import { passWater } from './physics/filter.ts';
import { loadShare, waterFill } from './physics/prime.ts';
import { dryShaftWatts, shaftWatts } from './physics/wet-end.ts';
import type { Load, Pump } from './pump.ts';

/** Flow and shaft power at a speed, with valves, baskets and filter as they are now. */
export function findLoad(pump: Pump, rpm: number): Load {
  const { spec, conditions, dirt } = pump;
  const closesSuction = conditions.suction.blocked ? 1e6 : 1;
  const state = {
    valve: conditions.valve * (0.8 + 0.2 * dirt.basket) * closesSuction,
    dirt: dirt.filter,
    staticFeet: conditions.extraStaticFeet,
  };
  const gpm = dutyGpm(spec.wetEnd, spec.system, state, rpm);
  return { rpm, gpm, wetWatts: shaftWatts(spec.wetEnd, gpm, rpm), dryWatts: dryShaftWatts(spec.wetEnd, rpm) };
}

/** Shaft power, W, with what rubs and drags beside the water. */
export function withFriction({ conditions }: Pump, shaft: number, rpm: number): number {
  return shaft * (1 + conditions.rubbing) + conditions.frictionWattsPerRpm * rpm;
}

/** Flow now, gpm: air in the pump costs it long before the load shows. */
export function currentGpm(pump: Pump, at: number): number {
  const fill = waterFill(pump.water, at);
  return fill <= 0.5 ? 0 : pump.load.gpm * ((fill - 0.5) / 0.5);
}

/** Counts the water that passed and works the load out anew: after a change of speed or valves, and every so often. */
export function refreshLoad(pump: Pump, at: number): void {
  const { spec, conditions, dirt, heat } = pump;
  const rates = { ...spec.dirtRates, filterPerKilogallon: spec.dirtRates.filterPerKilogallon * conditions.dirtRate };
  passWater(dirt, rates, currentGpm(pump, at), at);
  pump.load = findLoad(pump, pump.shaft.targetRpm);
  const share = loadShare(waterFill(pump.water, at));
  const shaft = pump.load.dryWatts + (pump.load.wetWatts - pump.load.dryWatts) * share;
  aimDriveHeat(heat, shaft / spec.drive.ratedWatts, conditions.hotDriveCelsius, at);
}
