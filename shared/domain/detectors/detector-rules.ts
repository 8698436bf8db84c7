import type { DetectorFactory } from './define-detector.ts';
import { failedPrime } from './rules/failed-prime.ts';
import { inputDisagreement } from './rules/input-disagreement.ts';
import { silent } from './rules/silent.ts';
import { stopped } from './rules/stopped.ts';
import { unexpectedRun } from './rules/unexpected-run.ts';
import { wrongSpeed } from './rules/wrong-speed.ts';

/** Every rule that the fold of a pump judges; the cause chain sets their order. */
export const DETECTOR_RULES: readonly DetectorFactory[] = [
  silent,
  stopped,
  unexpectedRun,
  failedPrime,
  inputDisagreement,
  wrongSpeed,
];
