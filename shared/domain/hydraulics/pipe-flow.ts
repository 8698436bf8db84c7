import {
  type NominalPipe,
  type PipeSide,
  PVC_SCHEDULE_40_INCHES,
  VELOCITY_LIMIT_FEET_PER_SECOND,
} from './pipes.data.ts';
import type { SystemCurve } from './system-curve.ts';

/** ft/s of 1 gpm in a pipe of 1 inch. Source: Hazen-Williams page of a general engineering reference; 0.320833 × 4 ÷ π. */
const FEET_PER_SECOND = 0.408709;
/** Standard gravity doubled, ft/s². */
const TWICE_GRAVITY = 2 * 32.174;

const arePositive = (...values: readonly number[]): boolean =>
  values.every((value) => Number.isFinite(value) && value > 0);

/**
 * The velocity (ft/s) of a flow (gpm from 0) in a pipe of this inside diameter (inches, above 0): 0.408709·q ÷ d².
 * undefined for bad input.
 *
 * @example pipeVelocity(62.2, 2.058) // 6.0
 */
export function pipeVelocity(gpm: number, insideInches: number): number | undefined {
  if (!Number.isFinite(gpm) || gpm < 0 || !arePositive(insideInches)) return undefined;
  return (FEET_PER_SECOND * gpm) / insideInches ** 2;
}

/**
 * The friction loss in feet per 100 ft of pipe by Hazen-Williams: 0.2083·(100 ÷ C)^1.852·q^1.852 ÷ d^4.8655, q in gpm,
 * d in inches. C 150 for new plastic. undefined for bad input.
 *
 * @example frictionPerHundredFeet(200, 3.048, 140) // 9.007
 */
export function frictionPerHundredFeet(gpm: number, insideInches: number, c = 150): number | undefined {
  if (!Number.isFinite(gpm) || gpm < 0 || !arePositive(insideInches, c)) return undefined;
  return (0.2083 * (100 / c) ** 1.852 * gpm ** 1.852) / insideInches ** 4.8655;
}

export type PipeRun = {
  readonly staticFeet: number;
  readonly frictionFactor: number;
  readonly lengthFeet: number;
  readonly insideInches: number;
  /** Σ K of the fittings. */
  readonly fittings: number;
};

/**
 * The system curve of a pipe with its fittings, by Darcy-Weisbach: H = static + (f·L ÷ D + ΣK)·v² ÷ 2g. undefined for
 * bad input.
 *
 * @example systemOfPipe({ staticFeet: 265, frictionFactor: 0.02, lengthFeet: 1255, insideInches: 4.026, fittings: 3.79 })
 * // { staticFeet: 265, k: 7.75e-4 }
 * Source: HI Data Tool, 01_sys-curves.
 */
export function systemOfPipe(pipe: PipeRun): SystemCurve | undefined {
  const { staticFeet, frictionFactor, lengthFeet, insideInches, fittings } = pipe;
  const velocity = pipeVelocity(1, insideInches);
  if (velocity === undefined || !arePositive(frictionFactor, lengthFeet) || !(fittings >= 0)) return undefined;
  const lossPerVelocity = ((frictionFactor * lengthFeet) / (insideInches / 12) + fittings) / TWICE_GRAVITY;
  const k = lossPerVelocity * velocity ** 2;
  return Number.isFinite(staticFeet) && Number.isFinite(k) ? { staticFeet, k } : undefined;
}

export type VelocityCheck = {
  readonly feetPerSecond: number;
  readonly limitFeetPerSecond: number;
  readonly within: boolean;
  /** The flow that reaches the limit in this pipe. */
  readonly largestGpm: number;
};

/**
 * Holds a flow (gpm) in a PVC Schedule 40 pipe against the largest velocity for that side. undefined for bad input.
 *
 * @example checkPipeVelocity(70, '2', 'suction') // { feetPerSecond: 6.75, limitFeetPerSecond: 6, within: false, largestGpm: 62.2 }
 */
export function checkPipeVelocity(gpm: number, pipe: NominalPipe, side: PipeSide): VelocityCheck | undefined {
  const inches = PVC_SCHEDULE_40_INCHES[pipe];
  const feetPerSecond = pipeVelocity(gpm, inches);
  if (feetPerSecond === undefined) return undefined;
  const limitFeetPerSecond = VELOCITY_LIMIT_FEET_PER_SECOND[side];
  const largestGpm = (limitFeetPerSecond * inches ** 2) / FEET_PER_SECOND;
  return { feetPerSecond, limitFeetPerSecond, within: feetPerSecond <= limitFeetPerSecond, largestGpm };
}
