import { describe, expect, it } from 'vitest';
import { judgeSource } from '#shared/domain/control/judge-source.ts';
import { fitsSpeed, speedTolerance } from '#shared/domain/control/speed-tolerance.ts';
import type { Source } from '#shared/domain/readings/reading.ts';
import { SETTINGS } from './invented-pump.ts';

type Said = { closedInputs?: number; reportedSource?: Source; decision?: [Source, number]; due?: [Source, number] };
function judged(
  rpm: number,
  { closedInputs = 0, reportedSource, decision = ['program', 1700], due = decision }: Said = {},
): string {
  const answer = { decision: { source: decision[0], rpm: decision[1] }, due: { source: due[0], rpm: due[1] } };
  return judgeSource(rpm, { closedInputs, reportedSource }, answer, SETTINGS);
}

describe('what a motor is judged to be doing', () => {
  it('is what was decided where the speed fits, and what is due where a stop does not hold', () => {
    expect(judged(1735)).toBe('program');
    expect(judged(1700, { decision: ['stop', 0], due: ['program', 1700] })).toBe('program');
  });

  it('is off at a standstill, unless a stop or fault was decided', () => {
    expect(judged(0)).toBe('off');
    expect(judged(40)).toBe('off');
    expect(judged(0, { decision: ['fault', 0] })).toBe('fault');
  });

  it('is what the motor says only where the speed bears it out', () => {
    expect(judged(3450, { reportedSource: 'prime' })).toBe('prime');
    expect(judged(3200, { reportedSource: 'timed' })).toBe('timed');
    expect(judged(1150, { reportedSource: 'freeze' })).toBe('freeze');
    expect(judged(3000, { reportedSource: 'prime' })).toBe('unknown');
    expect(judged(3450, { reportedSource: 'program' })).toBe('unknown');
  });

  it('is a prime at its speed also where the motor says nothing', () => {
    expect(judged(3450)).toBe('prime');
    expect(judged(3450, { decision: ['off', 0] })).toBe('prime');
  });

  it('is a closed input before the program, and an open one last', () => {
    expect(judged(2400, { closedInputs: 2, decision: ['input', 2850] })).toBe('input');
    expect(judged(2850)).toBe('input');
    expect(judged(2000)).toBe('unknown');
  });
});

describe('the tolerance of a speed', () => {
  it('is 40 rpm, or 2 % from 2000 rpm on', () => {
    expect([600, 2000, 2850, 3450].map(speedTolerance)).toEqual([40, 40, 57, 69]);
    expect(fitsSpeed(2907, 2850)).toBe(true);
    expect(fitsSpeed(2908, 2850)).toBe(false);
    expect(fitsSpeed(Number.NaN, 2850)).toBe(false);
  });
});
