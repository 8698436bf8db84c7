/** The drive's temperature above the air around it, which follows its losses with a lag. */
export type DriveHeat = { riseCelsius: number; since: number; targetCelsius: number };

const TAU_MS = 14 * 60_000;

export function driveRise(heat: DriveHeat, at: number): number {
  return heat.targetCelsius + (heat.riseCelsius - heat.targetCelsius) * Math.exp(-(at - heat.since) / TAU_MS);
}

/** The load changed: at full load a healthy drive stands 34 °C above the air, without power 4 °C. */
export function aimDriveHeat(heat: DriveHeat, loadShare: number, extraCelsius: number, at: number): void {
  heat.riseCelsius = driveRise(heat, at);
  heat.since = at;
  heat.targetCelsius = 4 + 30 * loadShare + (loadShare > 0 ? extraCelsius : 0);
}
