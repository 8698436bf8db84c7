import type { Detector } from './detector.ts';

/** A rule's own mistake, with the rule's name: the caller sets that pump aside and goes on with the others. */
export type DetectorFailure = Error & { readonly name: 'DetectorFailure'; readonly detector: Detector };

/**
 * Tags an error with the detector in which it arose.
 *
 * @example detectorFailure('stopped', new TypeError('x')).detector // 'stopped'
 */
export function detectorFailure(detector: Detector, cause: unknown): DetectorFailure {
  const reason = cause instanceof Error ? cause.message : String(cause);
  const error = new Error(`detector ${detector} failed: ${reason}`, { cause });
  return Object.assign(error, { name: 'DetectorFailure' as const, detector });
}

/**
 * Whether an error is a tagged failure of a detector.
 *
 * @example isDetectorFailure(detectorFailure('stopped', 'x')) // true
 */
export function isDetectorFailure(error: unknown): error is DetectorFailure {
  return error instanceof Error && error.name === 'DetectorFailure' && 'detector' in error;
}
