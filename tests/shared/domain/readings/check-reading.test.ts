import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { DEFAULT_TRAITS } from '#shared/domain/control/motor-settings.ts';
import { checkReading, isSoundReading } from '#shared/domain/readings/check-reading.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';

const GOOD: Reading = { at: 1_751_400_000_000, rpm: 1700, closedInputs: 0b011, activeInput: 1, watts: 312 };
const faults = (more: Partial<Reading>): string[] =>
  checkReading({ ...GOOD, ...more }, DEFAULT_TRAITS).map(({ field, reason }) => `${field} ${reason}`);

describe('a reading', () => {
  it('is accepted within its bounds', () => {
    expect(faults({})).toEqual([]);
    expect(faults({ rpm: 4000, watts: 6000, closedInputs: 0b111, activeInput: 3 })).toEqual([]);
    expect(faults({ rpm: 0, watts: 0, closedInputs: 0, activeInput: 0 })).toEqual([]);
  });

  it('is refused by name for what is no number, and for watts below zero', () => {
    expect(faults({ rpm: Number.NaN, watts: -1 })).toEqual(['rpm not-finite', 'watts too-small']);
    expect(faults({ at: Number.POSITIVE_INFINITY })).toEqual(['at not-finite']);
    expect(faults({ closedInputs: 1.5, activeInput: 9 })).toEqual([
      'closedInputs not-whole',
      'activeInput too-large',
      'activeInput input-beyond-model',
    ]);
  });

  it('is refused by name for an input that the model does not have', () => {
    expect(faults({ closedInputs: 0b1000, activeInput: 4 })).toEqual([
      'closedInputs input-beyond-model',
      'activeInput input-beyond-model',
    ]);
  });

  it('is sound exactly where nothing is wrong with it', () => {
    const field = (...odd: number[]) => fc.constantFrom(0, 1, 0.5, -1, Number.NaN, Number.POSITIVE_INFINITY, ...odd);
    const reading = fc.record({
      at: fc.oneof({ weight: 3, arbitrary: fc.constant(GOOD.at) }, field()),
      rpm: fc.oneof({ weight: 3, arbitrary: fc.constant(GOOD.rpm) }, field(4000, 4001)),
      watts: fc.oneof({ weight: 3, arbitrary: fc.constant(GOOD.watts) }, field(6000, 6001)),
      closedInputs: field(7, 8, 255, 256),
      activeInput: field(3, 4, 8, 9),
    });
    fc.assert(
      fc.property(reading, (one) => {
        expect(isSoundReading(one, DEFAULT_TRAITS)).toBe(checkReading(one, DEFAULT_TRAITS).length === 0);
      }),
      { numRuns: 1000 },
    );
  });
});
