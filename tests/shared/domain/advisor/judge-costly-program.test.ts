import { describe, expect, it } from 'vitest';
import { type Advice, adviseProgram } from '#shared/domain/advisor/advise-program.ts';
import { costlyProgramCause } from '#shared/domain/advisor/costly-program-cause.ts';
import {
  type CostlyMemory,
  judgeCostlyProgram,
  NO_COSTLY_MEMORY,
} from '#shared/domain/advisor/judge-costly-program.ts';
import type { PadState } from '#shared/domain/control/pump-context.ts';
import type { AlarmSignal } from '#shared/domain/detectors/detector.ts';
import { REQUEST } from './sample-request.ts';

const DAY = 86_400_000;
const FIRST = 20_000;
/** Eight hours at full speed: half as much water again as was asked for, at many times the watts. */
const dear = adviseProgram(REQUEST);
const figures = { kwhPerWeek: 100, microsPerWeek: 20_000_000, gallonsPerWeek: 140_000 };

function play(days: readonly (Advice | undefined)[], padState: PadState = 'open') {
  let memory: CostlyMemory = NO_COSTLY_MEMORY;
  const signals: AlarmSignal[] = [];
  for (const [index, advice] of days.entries()) {
    if (advice === undefined) continue;
    const localDay = FIRST + index;
    const judged = judgeCostlyProgram(memory, { advice, localDay, at: localDay * DAY, padState, currency: 'USD' });
    memory = JSON.parse(JSON.stringify(judged.memory)) as CostlyMemory;
    if (judged.signal !== undefined) signals.push(judged.signal);
  }
  return { memory, signals };
}

const times = <T>(count: number, value: T): T[] => Array.from({ length: count }, () => value);
const keep = { ...dear, kind: 'keep' } as Advice;

describe('costly-program', () => {
  it('notes a program that cost a quarter too much over fourteen days, with its figures, and clears once it is changed', () => {
    const { signals } = play([...times(14, dear), keep]);

    expect(signals).toMatchObject([
      {
        type: 'raised',
        alarmClass: 'note',
        priority: 'note',
        cause: 'hours-too-long',
        from: FIRST * DAY,
        evidence: { daysJudged: 12, currency: 'USD', costPerYearBefore: expect.stringMatching(/^\d+\.\d\d$/) },
      },
      { type: 'cleared', at: (FIRST + 14) * DAY },
    ]);
    expect(signals[0]!.at).toBeGreaterThanOrEqual((FIRST + 11) * DAY);
    if (dear.kind !== 'advice') throw new Error('the sample program is not dear');
    const { saving, costPerYearBefore, costPerYearAfter, kwhPerYearBefore } = signals[0]!.evidence;
    // A year has 365.25 / 7 weeks.
    expect(Number(costPerYearBefore)).toBeCloseTo((dear.before.microsPerWeek / 1e6) * 52.17857, 1);
    expect(kwhPerYearBefore).toBe(Math.round(dear.before.kwhPerWeek * 52.178_571));
    expect(1 - Number(costPerYearAfter) / Number(costPerYearBefore)).toBeCloseTo(Number(saving), 2);
  });

  it('says it once, and needs most of the fourteen days', () => {
    expect(play(times(40, dear)).signals).toHaveLength(1);
    expect(play(times(11, dear)).signals).toEqual([]);
    expect(play([...times(6, dear), ...times(10, undefined), ...times(6, dear)]).signals).toEqual([]);
  });

  it('stays silent on a good program, a lesser saving, one changed in time, and on a pad reduced for winter', () => {
    const lesser = { ...dear, savedShare: 0.2 } as Advice;

    expect(play(times(30, keep)).signals).toEqual([]);
    expect(play(times(30, lesser)).signals).toEqual([]);
    if (dear.kind !== 'advice') throw new Error('the sample program is not dear');
    // A quarter of 70 kWh a week is 913 kWh a year, of 80 it is 1044.
    const using = (kwhPerWeek: number): Advice => ({
      ...dear,
      savedShare: 0.25,
      before: { ...dear.before, kwhPerWeek },
    });
    expect(play(times(30, using(70))).signals).toEqual([]);
    expect(play(times(30, using(80))).signals).toHaveLength(1);
    expect(play([...times(10, dear), ...times(20, keep)]).signals).toEqual([]);
    expect(play(times(30, dear), 'reduced').signals).toEqual([]);
    expect(play(times(30, dear), 'new-plaster').signals).toEqual([]);
  });

  it('counts no day without a comparison', () => {
    const refused = adviseProgram({ ...REQUEST, entryLimit: -1 });
    expect(refused.kind).toBe('refused');
    expect(play(times(30, refused))).toEqual({ memory: NO_COSTLY_MEMORY, signals: [] });
  });

  it('names dear hours, too many hours, or too high a speed', () => {
    const cheaperHours = { ...figures, microsPerWeek: 12_000_000, kwhPerWeek: 98 };
    const lessWater = { ...figures, microsPerWeek: 12_000_000, kwhPerWeek: 60, gallonsPerWeek: 80_000 };
    const slower = { ...figures, microsPerWeek: 8_000_000, kwhPerWeek: 40 };

    expect(costlyProgramCause(figures, cheaperHours)).toBe('dear-hours');
    expect(costlyProgramCause(figures, lessWater)).toBe('hours-too-long');
    expect(costlyProgramCause(figures, slower)).toBe('speed-too-high');
    expect(costlyProgramCause(figures, figures)).toBe('unknown');
  });
});
