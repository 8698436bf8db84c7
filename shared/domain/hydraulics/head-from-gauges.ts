import { psiToFeetOfWater } from '#shared/units/pressure.ts';

/** 1 inch of mercury as feet of 20 °C water; 33.9596 ft and 29.9213 inHg to the atmosphere (HI
 * engineering data). */
export const FEET_PER_INCH_OF_MERCURY = 33.9596 / 29.9213;

/**
 * A pressure (psi) as head in feet of water of this specific gravity: 2.31·psi ÷ SG. undefined for bad input.
 *
 * @example feetFromPsi(10) // 23.1
 * Source: HI Data Tool, 01_sys-curves.
 */
export function feetFromPsi(psi: number, specificGravity = 1): number | undefined {
  if (!Number.isFinite(psi) || !Number.isFinite(specificGravity) || specificGravity <= 0) return undefined;
  return psiToFeetOfWater(psi) / specificGravity;
}

/** Gauges at the pump's two ports. Vacuum as read, positive under the air's pressure; heights of the gauges in feet. */
export type GaugePair = {
  readonly dischargePsi: number;
  readonly suctionInchesOfMercury: number;
  readonly dischargeAboveSuctionFeet?: number | undefined;
};

/**
 * Total dynamic head (ft) from a discharge pressure (psi) and a suction vacuum (inHg), plus the height between the
 * gauges. The velocity head is left out: ports of one size cancel it. undefined for bad input or a head under 0.
 *
 * @example headFromGauges({ dischargePsi: 20, suctionInchesOfMercury: 6 }) // 53.0
 * Source: total head from gauges, common practice; conversions as above.
 */
export function headFromGauges(gauges: GaugePair): number | undefined {
  const { dischargePsi, suctionInchesOfMercury, dischargeAboveSuctionFeet = 0 } = gauges;
  const feet =
    psiToFeetOfWater(dischargePsi) + suctionInchesOfMercury * FEET_PER_INCH_OF_MERCURY + dischargeAboveSuctionFeet;
  return Number.isFinite(feet) && feet >= 0 ? feet : undefined;
}
