import type { MotorModel } from './control/motor-model.ts';
import type { MotorModelName } from './models.data.ts';

const MINUTE_MS = 60_000;

/** How each invented motor's firmware behaves. */
export const MOTOR_MODELS: Readonly<Record<MotorModelName, MotorModel>> = {
  // The plain one: does not sense load, says little of itself.
  'Fernholt V3-165': {
    inputCount: 3,
    programOverlap: 'first-listed',
    stopBeatsInputs: true,
    timedResumes: false,
    primeRetry: undefined,
    says: { source: true, motorClock: false, temperatures: true, volts: true, settings: false },
    driveHotCelsius: 90,
  },
  'Fernholt V4-270': {
    inputCount: 4,
    programOverlap: 'higher-speed',
    stopBeatsInputs: true,
    timedResumes: true,
    primeRetry: { tries: 3, pauseMs: 15_000, restMs: 5 * MINUTE_MS },
    says: { source: true, motorClock: true, temperatures: true, volts: true, settings: true },
    driveHotCelsius: 95,
  },
  'Fernholt V5-350': {
    inputCount: 5,
    programOverlap: 'first-listed',
    stopBeatsInputs: false,
    timedResumes: false,
    primeRetry: { tries: 2, pauseMs: MINUTE_MS, restMs: 20 * MINUTE_MS },
    says: { source: true, motorClock: true, temperatures: true, volts: true, settings: true },
    driveHotCelsius: 100,
  },
};
