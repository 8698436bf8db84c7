import type { WetEndPoint } from '../control/pump-context.ts';

/**
 * The affinity laws: flow by the ratio, head by its square, power by its cube. The ratio is that of speeds, or of
 * impeller diameters for a trimmed impeller. Flow in gpm, head in feet, power in watts; any one consistent set of
 * units goes through. undefined for a ratio that is not above 0 or a point that is not finite.
 *
 * They hold along a system curve without static head, for hydraulic power alone: standby and drive losses do not
 * follow the cube (see `wattsAt`).
 *
 * @example scaleByAffinity({ gpm: 100, feet: 40, watts: 10000 }, 1.2) // { gpm: 120, feet: 57.6, watts: 17280 }
 * Source: HI Data Tool, equations 1.B.6a to c.
 */
export function scaleByAffinity(point: WetEndPoint, ratio: number): WetEndPoint | undefined {
  const { gpm, feet, watts } = point;
  if (![gpm, feet, watts, ratio].every(Number.isFinite) || ratio <= 0) return undefined;
  return { gpm: gpm * ratio, feet: feet * ratio ** 2, watts: watts * ratio ** 3 };
}

/**
 * The ratio of speeds (or diameters) that brings one head to another along the affinity laws: √(wanted ÷ given).
 * Both in the same unit and above 0, else undefined.
 *
 * @example ratioForHead(80, 67) // 0.9151
 */
export const ratioForHead = (given: number, wanted: number): number | undefined =>
  given > 0 && wanted > 0 && Number.isFinite(given) && Number.isFinite(wanted) ? Math.sqrt(wanted / given) : undefined;
