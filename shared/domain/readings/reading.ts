/** What commands the motor. One list for the wire, for runs and for screens. */
export const SOURCES = ['off', 'prime', 'input', 'keypad', 'timed', 'freeze', 'program', 'fault', 'stop'] as const;
export type Source = (typeof SOURCES)[number];

/** A run may also be a gap (`no-data`) or a speed nobody can account for (`unknown`). */
export type RunSource = Source | 'no-data' | 'unknown';

/**
 * One reading of a pump motor, as the device measured it.
 *
 * `at` is device time in ms since the Unix epoch; `rpm` 0 to 4000; `closedInputs` a mask, bit 0 = input 1;
 * `activeInput` 0 to 8, 0 = none; `watts` 0 to 6000 at the motor's line terminals. Source: the wire contract, v1.
 */
export type Reading = {
  readonly at: number;
  readonly rpm: number;
  readonly closedInputs: number;
  readonly activeInput: number;
  readonly watts: number;
  readonly reportedSource?: Source | undefined;
  readonly volts?: number | undefined;
  readonly driveCelsius?: number | undefined;
  readonly ambientCelsius?: number | undefined;
  /** The motor's own clock, minutes after midnight, 0 to 1439. */
  readonly motorClockMinute?: number | undefined;
  readonly fault?: string | undefined;
};
