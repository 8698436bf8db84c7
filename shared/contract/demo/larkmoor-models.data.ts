import { DEFAULT_PRECEDENCE } from '#shared/domain/control/motor-settings.ts';
import type { DemoMotorModel, DemoWetEndModel } from './demo-company.ts';

/** Motor models of the demo: three, four and five speed inputs. All of them are invented. */
export const LARKMOOR_MOTOR_MODELS: readonly DemoMotorModel[] = [
  {
    name: 'Fernholt V3-165',
    frame: '56Y',
    totalHorsepower: 1.65,
    serviceFactor: 1.1,
    traits: {
      inputCount: 3,
      precedence: DEFAULT_PRECEDENCE,
      programOverlap: 'first-listed',
      stopBeatsInputs: true,
      timedResumes: false,
      driveHotCelsius: 90,
    },
  },
  {
    name: 'Fernholt V4-270',
    frame: '56Y',
    totalHorsepower: 2.7,
    serviceFactor: 1.15,
    traits: {
      inputCount: 4,
      precedence: DEFAULT_PRECEDENCE,
      programOverlap: 'higher-speed',
      stopBeatsInputs: true,
      timedResumes: true,
      driveHotCelsius: 95,
    },
  },
  {
    name: 'Fernholt V5-350',
    frame: '56J',
    totalHorsepower: 3.5,
    serviceFactor: 1,
    traits: {
      inputCount: 5,
      precedence: DEFAULT_PRECEDENCE,
      programOverlap: 'first-listed',
      stopBeatsInputs: false,
      timedResumes: false,
      driveHotCelsius: 100,
    },
  },
];

/** Wet ends with the curves a maker would print: heads to half a foot, watts to ten. All of them are invented. */
export const LARKMOOR_WET_END_MODELS: readonly DemoWetEndModel[] = [
  {
    name: 'Aldermere 100',
    referenceRpm: 3450,
    standbyWatts: 6,
    points: [
      { gpm: 0, feet: 68, watts: 500 },
      { gpm: 12, feet: 67.5, watts: 650 },
      { gpm: 24, feet: 65.5, watts: 790 },
      { gpm: 34, feet: 62.5, watts: 900 },
      { gpm: 46, feet: 57.5, watts: 1010 },
      { gpm: 58, feet: 50.5, watts: 1090 },
      { gpm: 66, feet: 44.5, watts: 1120 },
      { gpm: 76, feet: 35.5, watts: 1130 },
    ],
  },
  {
    name: 'Aldermere 150',
    referenceRpm: 3450,
    standbyWatts: 8,
    points: [
      { gpm: 0, feet: 84, watts: 820 },
      { gpm: 16, feet: 83.5, watts: 1040 },
      { gpm: 32, feet: 81, watts: 1260 },
      { gpm: 46, feet: 77.5, watts: 1440 },
      { gpm: 62, feet: 71.5, watts: 1610 },
      { gpm: 78, feet: 64, watts: 1720 },
      { gpm: 90, feet: 56.5, watts: 1760 },
      { gpm: 102, feet: 48, watts: 1770 },
    ],
  },
  {
    name: 'Aldermere 220',
    referenceRpm: 3450,
    standbyWatts: 11,
    points: [
      { gpm: 0, feet: 97, watts: 1280 },
      { gpm: 22, feet: 96.5, watts: 1620 },
      { gpm: 44, feet: 94.5, watts: 1950 },
      { gpm: 64, feet: 90.5, watts: 2220 },
      { gpm: 86, feet: 84, watts: 2470 },
      { gpm: 108, feet: 74.5, watts: 2620 },
      { gpm: 124, feet: 66, watts: 2680 },
      { gpm: 140, feet: 56, watts: 2680 },
    ],
  },
  {
    name: 'Aldermere Cascade',
    referenceRpm: 3450,
    standbyWatts: 8,
    points: [
      { gpm: 0, feet: 46, watts: 740 },
      { gpm: 24, feet: 45.5, watts: 900 },
      { gpm: 48, feet: 43.5, watts: 1060 },
      { gpm: 72, feet: 41, watts: 1210 },
      { gpm: 96, feet: 37, watts: 1320 },
      { gpm: 120, feet: 32, watts: 1390 },
      { gpm: 138, feet: 28, watts: 1410 },
      { gpm: 156, feet: 23.5, watts: 1410 },
    ],
  },
];
