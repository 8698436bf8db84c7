import { isSystemCurve, type SystemCurve, systemHead } from './system-curve.ts';

/** The known system curve that an observed point lies nearest to, and by how many sigmas it misses it. */
export type NearestSystem = {
  readonly curve: SystemCurve;
  /** Observed head less the curve's, ft: above 0 the pipes ask for more than this curve. */
  readonly missFeet: number;
  readonly sigmas: number;
  /** Whether the point is one of this curve: within two sigmas. Only a point off every curve is news. */
  readonly fits: boolean;
};

const FITTING_SIGMAS = 2;

/**
 * Finds which of a pad's known system curves (valves, solar, spa) an observed flow (gpm) and head (ft) belong to, the
 * head with one sigma (ft, above 0) that holds the flow's too. undefined without a known curve or for bad input.
 *
 * @example findNearestSystem([pool, spa], { gpm: 60, feet: 30 }, 2)?.curve.name // 'pool'
 */
export function findNearestSystem(
  known: readonly SystemCurve[],
  observed: { readonly gpm: number; readonly feet: number },
  sigmaFeet: number,
): NearestSystem | undefined {
  const { gpm, feet } = observed;
  if (!Number.isFinite(feet) || !(sigmaFeet > 0) || !Number.isFinite(sigmaFeet)) return undefined;
  let nearest: NearestSystem | undefined;
  for (const curve of known.filter(isSystemCurve)) {
    const asked = systemHead(curve, gpm);
    if (asked === undefined) continue;
    const missFeet = feet - asked;
    const sigmas = Math.abs(missFeet) / sigmaFeet;
    if (nearest === undefined || sigmas < nearest.sigmas)
      nearest = { curve, missFeet, sigmas, fits: sigmas <= FITTING_SIGMAS };
  }
  return nearest;
}
