import type { MotorTraits } from '../control/motor-settings.ts';
import { checkNumber, type NumberFault } from '../refusal/check-number.ts';
import type { Refusal } from '../refusal/refusal.ts';
import type { Reading } from './reading.ts';

export type ReadingFault = NumberFault | 'input-beyond-model';

/**
 * Everything that is wrong with a reading of a pump whose model is known, by name; empty where it can be folded. The
 * wire bounds the same fields without knowing the model.
 *
 * @example checkReading({ at: 1, rpm: Number.NaN, closedInputs: 0, activeInput: 0, watts: 5 }, DEFAULT_TRAITS)
 * // [{ reason: 'not-finite', field: 'rpm', allowed: 'a finite number from 0 up to 4000 rpm' }]
 */
export function checkReading(reading: Reading, { inputCount }: MotorTraits): Refusal<ReadingFault>[] {
  const faults: Refusal<ReadingFault>[] = [
    ...checkNumber(reading.at, { field: 'at', unit: 'ms', least: 0, whole: true }),
    ...checkNumber(reading.rpm, { field: 'rpm', unit: 'rpm', least: 0, most: 4000 }),
    ...checkNumber(reading.watts, { field: 'watts', unit: 'W', least: 0, most: 6000 }),
    ...checkNumber(reading.closedInputs, { field: 'closedInputs', unit: '', least: 0, most: 255, whole: true }),
    ...checkNumber(reading.activeInput, { field: 'activeInput', unit: '', least: 0, most: 8, whole: true }),
  ];
  const allowed = `inputs 1 to ${inputCount}`;
  if (reading.closedInputs >= 1 << inputCount)
    faults.push({ reason: 'input-beyond-model', field: 'closedInputs', allowed });
  if (reading.activeInput > inputCount) faults.push({ reason: 'input-beyond-model', field: 'activeInput', allowed });
  return faults;
}

/**
 * Whether `checkReading` finds nothing: the same bounds as plain comparisons, for every reading that is folded. NaN
 * passes none of them.
 *
 * @example isSoundReading({ at: 1, rpm: 1700, closedInputs: 8, activeInput: 0, watts: 5 }, DEFAULT_TRAITS) // false
 */
export function isSoundReading(reading: Reading, { inputCount }: MotorTraits): boolean {
  const { at, rpm, watts, closedInputs, activeInput } = reading;
  return (
    Number.isInteger(at) &&
    Number.isInteger(closedInputs) &&
    Number.isInteger(activeInput) &&
    at >= 0 &&
    rpm >= 0 &&
    rpm <= 4000 &&
    watts >= 0 &&
    watts <= 6000 &&
    closedInputs >= 0 &&
    closedInputs < 1 << inputCount &&
    activeInput >= 0 &&
    activeInput <= inputCount
  );
}
