import type { DetectorFactory } from './define-detector.ts';
import { chatteringInput } from './rules/chattering-input.ts';
import { clockShift } from './rules/clock-shift.ts';
import { clockSkew } from './rules/clock-skew.ts';
import { driveFault } from './rules/drive-fault.ts';
import { driveHot } from './rules/drive-hot.ts';
import { energizedWithoutFlow } from './rules/energized-without-flow.ts';
import { failedPrime } from './rules/failed-prime.ts';
import { fedThroughClock } from './rules/fed-through-clock.ts';
import { freezing } from './rules/freezing.ts';
import { highLoad } from './rules/high-load.ts';
import { inputDisagreement } from './rules/input-disagreement.ts';
import { keypadHold } from './rules/keypad-hold.ts';
import { lossOfPrime } from './rules/loss-of-prime.ts';
import { lowLoad } from './rules/low-load.ts';
import { missingInput } from './rules/missing-input.ts';
import { motorClock } from './rules/motor-clock.ts';
import { settingsChanged } from './rules/settings-changed.ts';
import { silent } from './rules/silent.ts';
import { slowPrime } from './rules/slow-prime.ts';
import { stopped } from './rules/stopped.ts';
import { stuckInput } from './rules/stuck-input.ts';
import { supplyVoltage } from './rules/supply-voltage.ts';
import { tooLittleWater } from './rules/too-little-water.ts';
import { unexpectedRun } from './rules/unexpected-run.ts';
import { wrongSpeed } from './rules/wrong-speed.ts';

/** Every rule that the fold of a pump judges; the cause chain sets their order. */
export const DETECTOR_RULES: readonly DetectorFactory[] = [
  chatteringInput,
  clockShift,
  clockSkew,
  driveFault,
  driveHot,
  energizedWithoutFlow,
  failedPrime,
  fedThroughClock,
  freezing,
  highLoad,
  inputDisagreement,
  keypadHold,
  lossOfPrime,
  lowLoad,
  missingInput,
  motorClock,
  settingsChanged,
  silent,
  slowPrime,
  stopped,
  stuckInput,
  supplyVoltage,
  tooLittleWater,
  unexpectedRun,
  wrongSpeed,
];
