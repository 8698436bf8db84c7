import { describe, expect, it } from 'vitest';
import { dayFlags, listProgramEntries } from '#shared/domain/advisor/program-entries.ts';

const speeds = [
  { rpm: 1000, gpm: 20, watts: 60 },
  { rpm: 2000, gpm: 40, watts: 300 },
];
const days = dayFlags([0, 1, 2, 3, 4, 5, 6]);
const day = (fill: readonly (readonly [number, number])[]) =>
  Array.from({ length: 96 }, (_, slot) => fill.find(([, until]) => slot < until)?.[0] ?? 0);

describe('program entries', () => {
  it('are the stretches at one speed, off left out', () => {
    expect(
      listProgramEntries(
        day([
          [0, 24],
          [1, 48],
          [2, 56],
          [0, 96],
        ]),
        speeds,
        days,
        false,
      ),
    ).toEqual([
      { days, fromMinute: 360, toMinute: 720, rpm: 1000 },
      { days, fromMinute: 720, toMinute: 840, rpm: 2000 },
    ]);
  });

  it('run past midnight as one where the day leads into itself, and end at 24:00 where it does not', () => {
    const choices = day([
      [1, 24],
      [0, 88],
      [1, 96],
    ]);

    expect(listProgramEntries(choices, speeds, days, true)).toEqual([
      { days, fromMinute: 1320, toMinute: 360, rpm: 1000 },
    ]);
    expect(listProgramEntries(choices, speeds, days, false).map(({ toMinute }) => toMinute)).toEqual([360, 1440]);
  });

  it('are one for a whole day at one speed, none for a day off', () => {
    expect(listProgramEntries(day([[2, 96]]), speeds, days, true)).toEqual([
      { days, fromMinute: 0, toMinute: 1440, rpm: 2000 },
    ]);
    expect(listProgramEntries(day([]), speeds, days, true)).toEqual([]);
  });

  it('name their weekdays, Monday first', () => {
    expect(dayFlags([5, 6])).toEqual([false, false, false, false, false, true, true]);
  });
});
