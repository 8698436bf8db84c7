import { DAY_MINUTES } from '../time/local-time.ts';
import type { NeedKind, PadNeeds } from './pad-needs.ts';
import { marginOf } from './speed-limits.ts';
import type { SpeedOption } from './speed-option.ts';
import { visitMinutes, type WeekMinutes } from './week-minutes.ts';

/** A need that a program leaves short: on which weekdays (0 = Monday), and by how much on the worst of them. */
export type Shortfall = {
  readonly need: NeedKind | 'daily-volume' | 'flow-hours' | 'quiet-hours';
  readonly weekdays: readonly number[];
  /** Gallons short for the daily volume; minutes for everything else. */
  readonly short: number;
};

const summarize = (need: Shortfall['need'], byWeekday: ReadonlyMap<number, number>): Shortfall[] =>
  byWeekday.size === 0
    ? []
    : [{ need, weekdays: [...byWeekday.keys()].sort((a, b) => a - b), short: Math.max(...byWeekday.values()) }];

/** Counts minutes that fail a test, by the weekday they fall on. */
function countMinutes(visit: (mark: (minute: number) => void) => void): Map<number, number> {
  const byWeekday = new Map<number, number>();
  visit((minute) => {
    const weekday = Math.floor(minute / DAY_MINUTES);
    byWeekday.set(weekday, (byWeekday.get(weekday) ?? 0) + 1);
  });
  return byWeekday;
}

function findShortDays(
  speeds: WeekMinutes,
  needs: PadNeeds,
  speedAt: (rpm: number) => SpeedOption | undefined,
): Shortfall[] {
  const [gallonsShort, minutesShort] = [new Map<number, number>(), new Map<number, number>()];
  for (let weekday = 0; weekday < 7; weekday += 1) {
    let [gallons, minutes] = [0, 0];
    for (const rpm of speeds.subarray(weekday * DAY_MINUTES, (weekday + 1) * DAY_MINUTES)) {
      const gpm = rpm > 0 ? (speedAt(rpm)?.gpm ?? 0) : 0;
      gallons += gpm;
      if (needs.hours !== undefined && gpm >= needs.hours.minimumGpm) minutes += 1;
    }
    const missing = needs.gallonsPerDay - gallons;
    if (missing > 1e-6 * Math.max(1, needs.gallonsPerDay)) gallonsShort.set(weekday, missing);
    const wanted = (needs.hours?.hours ?? 0) * 60;
    if (minutes < wanted) minutesShort.set(weekday, wanted - minutes);
  }
  return [...summarize('daily-volume', gallonsShort), ...summarize('flow-hours', minutesShort)];
}

/**
 * Holds a week's speeds, minute by minute, against a pad's needs, and names every one left short. `inputs` are the
 * speeds that inputs give anyway: quiet hours do not bind those. None left short: an empty list.
 *
 * @example findShortfalls(speedsOfWeek(week), inputs, needs, speedAt) // [{ need: 'booster', weekdays: [0, …], short: 30 }]
 */
export function findShortfalls(
  speeds: WeekMinutes,
  inputs: WeekMinutes,
  needs: PadNeeds,
  speedAt: (rpm: number) => SpeedOption | undefined,
): Shortfall[] {
  const windows = needs.windows.flatMap((need) => {
    const { kind, minimumRpm = 0, minimumGpm = 0 } = need;
    const short = countMinutes((mark) =>
      visitMinutes(need, marginOf(need), (minute) => {
        const rpm = speeds[minute] ?? 0;
        const gpm = rpm > 0 ? (speedAt(rpm)?.gpm ?? 0) : 0;
        if (rpm < minimumRpm || gpm < minimumGpm) mark(minute);
      }),
    );
    return summarize(kind, short);
  });
  const loud = countMinutes((mark) => {
    for (const quiet of needs.quiet)
      visitMinutes(quiet, 0, (minute) => {
        if (inputs[minute] === 0 && (speeds[minute] ?? 0) > quiet.maximumRpm) mark(minute);
      });
  });
  return [...findShortDays(speeds, needs, speedAt), ...windows, ...summarize('quiet-hours', loud)];
}
