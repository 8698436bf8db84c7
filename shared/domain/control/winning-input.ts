import type { MotorSettings } from './motor-settings.ts';

/** Inputs closer than this, rpm, are equal: either number is right. */
const EQUAL_INPUTS_RPM = 40;

/**
 * The closed input that sets the speed: the highest speed among the closed inputs that have one, the lowest number
 * of equals; 0 where none wins. `closedInputs` is a mask, bit 0 = input 1. An input set to null never wins.
 *
 * @example winningInput([2850, 2400, null], 0b110) // 2
 */
export function winningInput(inputs: MotorSettings['inputs'], closedInputs: number): number {
  let winner = 0;
  let highest = Number.NEGATIVE_INFINITY;
  for (let index = 0; index < inputs.length; index += 1) {
    const rpm = inputs[index];
    if (rpm === null || rpm === undefined || (closedInputs & (1 << index)) === 0 || !(rpm > highest)) continue;
    winner = index + 1;
    highest = rpm;
  }
  return winner;
}

/**
 * Whether an input may be the one obeyed: it is closed, has a speed, and none closed is faster by more than 40 rpm.
 * With nothing to win, 0 is the right answer.
 *
 * @example isWinningInput([2850, 2830], 0b11, 2) // true
 */
export function isWinningInput(inputs: MotorSettings['inputs'], closedInputs: number, input: number): boolean {
  const winner = winningInput(inputs, closedInputs);
  if (winner === 0 || input === 0) return winner === input;
  const rpm = inputs[input - 1];
  if (rpm === null || rpm === undefined || (closedInputs & (1 << (input - 1))) === 0) return false;
  return rpm >= inputSpeed(inputs, winner) - EQUAL_INPUTS_RPM;
}

/**
 * The speed set for an input, rpm; 0 for one that has none or does not exist.
 *
 * @example inputSpeed([2850, null], 1) // 2850
 */
export function inputSpeed(inputs: MotorSettings['inputs'], input: number): number {
  return inputs[input - 1] ?? 0;
}

/**
 * The numbers of the inputs in a mask, lowest first.
 *
 * @example listClosedInputs(0b101) // [1, 3]
 */
export function listClosedInputs(closedInputs: number): number[] {
  const numbers: number[] = [];
  for (let index = 0; index < 8; index += 1) if ((closedInputs & (1 << index)) !== 0) numbers.push(index + 1);
  return numbers;
}
