import type { MotorDrive } from './physics/motor-drive.ts';
import type { WetEnd } from './physics/wet-end.ts';

/** The true wet ends behind the invented models; the curves a maker prints are computed from these and rounded. */
export const WET_ENDS = {
  'Aldermere 100': {
    referenceRpm: 3450,
    shutOffFeet: 68,
    bestGpm: 58,
    bestHeadShare: 0.74,
    headExponent: 2.25,
    bestEfficiency: 0.56,
    shutOffPowerShare: 0.43,
    powerPeakShare: 1.3,
    dryPowerShare: 0.23,
  },
  'Aldermere 150': {
    referenceRpm: 3450,
    shutOffFeet: 84,
    bestGpm: 78,
    bestHeadShare: 0.76,
    headExponent: 2.15,
    bestEfficiency: 0.6,
    shutOffPowerShare: 0.45,
    powerPeakShare: 1.28,
    dryPowerShare: 0.22,
  },
  'Aldermere 220': {
    referenceRpm: 3450,
    shutOffFeet: 97,
    bestGpm: 108,
    bestHeadShare: 0.77,
    headExponent: 2.35,
    bestEfficiency: 0.63,
    shutOffPowerShare: 0.47,
    powerPeakShare: 1.25,
    dryPowerShare: 0.21,
  },
  'Aldermere Cascade': {
    referenceRpm: 3450,
    shutOffFeet: 46,
    bestGpm: 120,
    bestHeadShare: 0.7,
    headExponent: 1.9,
    bestEfficiency: 0.58,
    shutOffPowerShare: 0.5,
    powerPeakShare: 1.22,
    dryPowerShare: 0.24,
  },
} as const satisfies Record<string, WetEnd>;

/** The true drives behind the invented motor models. */
export const MOTOR_DRIVES = {
  'Fernholt V3-165': {
    standbyWatts: 6,
    ratedWatts: 1230,
    ratedRpm: 3450,
    ironShare: 0.052,
    copperShare: 0.045,
    rampUp: 420,
    rampDown: 600,
  },
  'Fernholt V4-270': {
    standbyWatts: 8,
    ratedWatts: 2010,
    ratedRpm: 3450,
    ironShare: 0.047,
    copperShare: 0.04,
    rampUp: 350,
    rampDown: 500,
  },
  'Fernholt V5-350': {
    standbyWatts: 11,
    ratedWatts: 2610,
    ratedRpm: 3450,
    ironShare: 0.043,
    copperShare: 0.038,
    rampUp: 300,
    rampDown: 450,
  },
} as const satisfies Record<string, MotorDrive>;

export type MotorModelName = keyof typeof MOTOR_DRIVES;
