import type { Source } from '../readings/reading.ts';

/**
 * One entry of the motor's own program. Half-open in the motor's local time: from `fromMinute` (0 to 1439) to
 * `toMinute` (1 to 1440; at or below `fromMinute` it ends the next day). `days` has seven flags, Monday first,
 * and names the day of `fromMinute`.
 */
export type ProgramEntry = {
  readonly days: readonly boolean[];
  readonly fromMinute: number;
  readonly toMinute: number;
  readonly rpm: number;
};

/** What a motor is set to. `null` = not used. Speeds in rpm; `inputs[0]` is input 1. */
export type MotorSettings = {
  readonly inputs: readonly (number | null)[];
  readonly program: readonly ProgramEntry[];
  readonly prime: { readonly rpm: number; readonly seconds: number } | null;
  readonly timed: { readonly rpm: number; readonly minutes: number } | null;
  readonly freeze: { readonly celsius: number; readonly rpm: number } | null;
  readonly maxRpm: number;
  readonly minRpm: number;
};

/** How a motor model decides; data of the model, not of the pump. */
export type MotorTraits = {
  readonly inputCount: number;
  /** First wins. The default is DEFAULT_PRECEDENCE. */
  readonly precedence: readonly Source[];
  /** Where two program entries overlap: the first listed, or the higher speed. */
  readonly programOverlap: 'first-listed' | 'higher-speed';
  /** Whether the keypad's stop beats a closed input. */
  readonly stopBeatsInputs: boolean;
  /** Whether a timed run goes on after an input interrupted it. */
  readonly timedResumes: boolean;
  /** Drive temperature limit of the model, °C. */
  readonly driveHotCelsius: number;
};

export const DEFAULT_PRECEDENCE: readonly Source[] = [
  'fault',
  'stop',
  'prime',
  'input',
  'keypad',
  'timed',
  'program',
  'freeze',
  'off',
];

export const DEFAULT_TRAITS: MotorTraits = {
  inputCount: 3,
  precedence: DEFAULT_PRECEDENCE,
  programOverlap: 'first-listed',
  stopBeatsInputs: true,
  timedResumes: false,
  driveHotCelsius: 90,
};
