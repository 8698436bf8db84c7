import type { ProgramEntry } from '../control/motor-settings.ts';
import { DAY_MINUTES } from '../time/local-time.ts';
import { listStretches } from './list-stretches.ts';
import { GRID_MINUTES } from './pad-needs.ts';
import type { SpeedOption } from './speed-option.ts';

/** Seven flags, Monday first. @example dayFlags([0, 6]) // [true, false, false, false, false, false, true] */
export const dayFlags = (weekdays: readonly number[]): boolean[] =>
  Array.from({ length: 7 }, (_, weekday) => weekdays.includes(weekday));

/**
 * The program entries that a day's choices on the grid (0 = off, then the speeds in order) come to, for some weekdays.
 * On a day that leads into itself, a speed that goes on past midnight is one entry.
 *
 * @example listProgramEntries(choices, speeds, dayFlags([0, 1, 2, 3, 4]), false)
 * // [{ days: […], fromMinute: 360, toMinute: 720, rpm: 1700 }]
 */
export function listProgramEntries(
  choices: readonly number[],
  speeds: readonly SpeedOption[],
  days: readonly boolean[],
  cyclic: boolean,
): ProgramEntry[] {
  const stretches = listStretches(choices);
  const [first, last] = [stretches[0], stretches.at(-1)];
  if (cyclic && first !== undefined && last !== undefined && first !== last && first.choice === last.choice) {
    stretches.shift();
    last.to = first.to;
  }
  return stretches.flatMap(({ from, to, choice }) => {
    const speed = speeds[choice - 1];
    if (speed === undefined) return [];
    const toMinute = to * GRID_MINUTES;
    return [
      { days, fromMinute: from * GRID_MINUTES, toMinute: toMinute === 0 ? DAY_MINUTES : toMinute, rpm: speed.rpm },
    ];
  });
}
