import type { MotorSettings, MotorTraits } from '../control/motor-settings.ts';
import type { InputWindow } from '../control/window-spans.ts';
import { planWeek } from '../energy/plan-week.ts';
import { DAY_MINUTES } from '../time/local-time.ts';
import { GRID_MINUTES, type NeedKind, SLOTS_A_DAY } from './pad-needs.ts';
import type { SpeedLimits } from './speed-limits.ts';
import { speedsOfWeek, WEEK_MINUTES, type WeekMinutes } from './week-minutes.ts';

/**
 * A quarter-hour of one weekday. Only `freeMinutes` of it are the program's; in the others an input runs the motor.
 * Speeds in rpm; `askedBy` is the need behind `leastRpm`.
 */
export type GridSlot = {
  readonly freeMinutes: number;
  readonly leastRpm: number;
  readonly mostRpm: number;
  readonly askedBy: NeedKind | undefined;
  /** An input runs the motor in the minute before, so that a program entry that begins here needs no prime. */
  readonly runsBefore: boolean;
  /** An input starts in this slot after its first minute, or with the first minute of the next one. */
  readonly inputStartsRpm: number;
};

/** The input's speed in every minute of the week with no program at all; 0 where no input runs the motor. */
export function inputSpeeds(
  settings: MotorSettings,
  traits: MotorTraits,
  windows: readonly InputWindow[],
): WeekMinutes {
  // Without a prime: whether an input's start needs one depends on the program before it.
  return speedsOfWeek(planWeek({ ...settings, program: [], prime: null }, traits, windows));
}

const minuteAt = (minutes: WeekMinutes, minute: number): number => minutes[(minute + WEEK_MINUTES) % WEEK_MINUTES] ?? 0;

function buildSlot(start: number, inputs: WeekMinutes, limits: SpeedLimits): GridSlot {
  let [freeMinutes, leastRpm, mostRpm, inputStartsRpm] = [0, 0, Number.POSITIVE_INFINITY, 0];
  let askedBy: NeedKind | undefined;
  for (let minute = start; minute < start + GRID_MINUTES; minute += 1) {
    const here = minuteAt(inputs, minute);
    const next = minuteAt(inputs, minute + 1);
    if (here === 0 && next > 0) inputStartsRpm = next;
    if (here > 0) continue;
    freeMinutes += 1;
    mostRpm = Math.min(mostRpm, limits.most[minute] ?? mostRpm);
    if ((limits.least[minute] ?? 0) <= leastRpm) continue;
    leastRpm = limits.least[minute] ?? 0;
    askedBy = limits.askedBy[minute];
  }
  return { freeMinutes, leastRpm, mostRpm, askedBy, runsBefore: minuteAt(inputs, start - 1) > 0, inputStartsRpm };
}

/**
 * Cuts one weekday (0 = Monday) into quarter-hours: what is the program's, what it must keep to, and where inputs start.
 *
 * @example buildDayGrid(0, inputSpeeds(settings, traits, windows), limits)[24]?.freeMinutes // 15 at six o'clock
 */
export const buildDayGrid = (weekday: number, inputs: WeekMinutes, limits: SpeedLimits): GridSlot[] =>
  Array.from({ length: SLOTS_A_DAY }, (_, slot) =>
    buildSlot(weekday * DAY_MINUTES + slot * GRID_MINUTES, inputs, limits),
  );
