import { type FlowAnswer, HIGH_SPEED_RATIO } from './flow-estimate.ts';
import type { SystemCurve } from './system-curve.ts';

/** A system curve as learnt from the watts, with one standard deviation of its k. */
export type SystemEstimate = SystemCurve & { readonly sigmaK: number };

/** One answer of the virtual flow meter, the share of the reference speed it was read at, and how long it held. */
export type TimedFlow = { readonly speedRatio: number; readonly milliseconds: number; readonly flow: FlowAnswer };

/**
 * The k of a day (ft/gpm²) from its fast runs: the mean of their k, each by its length over its variance. The sigma is
 * the weighted mean of theirs, not less: a meter's error is the same all day and does not average out. Runs below
 * 0.7 of the reference speed and answers without k are left out; undefined when none is left.
 *
 * @example estimateDaySystem([{ speedRatio: 1, milliseconds: 3_600_000, flow }], 0) // { staticFeet: 0, k: 0.0094, sigmaK: 0.001 }
 */
export function estimateDaySystem(flows: readonly TimedFlow[], staticFeet: number): SystemEstimate | undefined {
  let [weight, weightedK, weightedSigma] = [0, 0, 0];
  for (const { speedRatio, milliseconds, flow } of flows) {
    if (flow.kind !== 'estimate' || flow.k === undefined || flow.sigmaK === undefined) continue;
    if (!(speedRatio >= HIGH_SPEED_RATIO) || !(milliseconds > 0) || !(flow.sigmaK > 0)) continue;
    const part = milliseconds / flow.sigmaK ** 2;
    weight += part;
    weightedK += part * flow.k;
    weightedSigma += part * flow.sigmaK;
  }
  if (!(weight > 0) || !Number.isFinite(weightedK) || !Number.isFinite(staticFeet)) return undefined;
  return { staticFeet, k: weightedK / weight, sigmaK: weightedSigma / weight };
}
