import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { inputSpeed, isWinningInput, listClosedInputs, winningInput } from '#shared/domain/control/winning-input.ts';

describe('the winning input', () => {
  it('is the fastest of the closed ones', () => {
    expect(winningInput([2850, 2400, 3000], 0b011)).toBe(1);
    expect(winningInput([2850, 2400, 3000], 0b110)).toBe(3);
    expect(winningInput([2850, 2400, 3000], 0)).toBe(0);
  });

  it('is never one that is set to null, nor one the motor does not have', () => {
    expect(winningInput([null, 2400], 0b01)).toBe(0);
    expect(winningInput([null, 2400], 0b11)).toBe(2);
    expect(winningInput([2850], 0b1000)).toBe(0);
  });

  it('may be either of two within 40 rpm, and not one 41 below', () => {
    expect(isWinningInput([2850, 2810], 0b11, 1)).toBe(true);
    expect(isWinningInput([2850, 2810], 0b11, 2)).toBe(true);
    expect(isWinningInput([2850, 2809], 0b11, 2)).toBe(false);
    expect(isWinningInput([2850, 2850], 0b01, 2)).toBe(false);
    expect(isWinningInput([2850, null], 0b10, 0)).toBe(true);
    expect(isWinningInput([2850, null], 0b10, 2)).toBe(false);
    expect(isWinningInput([2850, null], 0b01, 0)).toBe(false);
  });

  it('is a winner by its own test, closed, and as fast as any', () => {
    const speeds = fc.array(fc.option(fc.integer({ min: 600, max: 3450 })), { maxLength: 8 });
    fc.assert(
      fc.property(speeds, fc.integer({ min: 0, max: 255 }), (inputs, mask) => {
        const winner = winningInput(inputs, mask);
        expect(isWinningInput(inputs, mask, winner)).toBe(true);
        const closed = listClosedInputs(mask).map((input) => inputSpeed(inputs, input));
        expect(inputSpeed(inputs, winner)).toBe(Math.max(0, ...closed));
      }),
    );
  });
});
