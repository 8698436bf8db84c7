/** What asks for water at a pad; `booster` is covered with half an hour on each side. */
export const NEED_KINDS = [
  'heater',
  'cell',
  'feeder',
  'booster',
  'cleaner',
  'feature',
  'solar',
  'spa',
  'skimming',
] as const;
export type NeedKind = (typeof NEED_KINDS)[number];

/**
 * A daily window in wall time. `days` has seven flags, Monday first, of the day it begins on; `toMinute` at or below
 * `fromMinute` ends it the next day.
 */
export type DailyWindow = { readonly days: readonly boolean[]; readonly fromMinute: number; readonly toMinute: number };

/** In this window the pump must turn at least this fast, or move at least this much. */
export type WindowNeed = DailyWindow & {
  readonly kind: NeedKind;
  readonly minimumRpm?: number | undefined;
  readonly minimumGpm?: number | undefined;
};

/** At least this flow for so many hours a day, whenever they are. */
export type HoursNeed = { readonly kind: NeedKind; readonly minimumGpm: number; readonly hours: number };

/** What a pad needs of a program in one season. */
export type PadNeeds = {
  /** Water to move every day, US gallons; from the season's turnovers and the pool's volume. */
  readonly gallonsPerDay: number;
  readonly windows: readonly WindowNeed[];
  readonly hours?: HoursNeed | undefined;
  /** In these hours a program may not turn the pump faster. A closed input is not held to it. */
  readonly quiet: readonly (DailyWindow & { readonly maximumRpm: number })[];
};

/** A booster pump must have water from half an hour before it starts to half an hour after it stops. */
export const BOOSTER_MARGIN_MINUTES = 30;

/** Length of a program's grid, minutes. */
export const GRID_MINUTES = 15;
export const SLOTS_A_DAY = 1440 / GRID_MINUTES;

export type UnmetReason =
  /** The needs add up to more than every speed allowed gives. */
  | 'more-than-it-can-move'
  /** No speed of the motor gives it. */
  | 'beyond-top-speed'
  /** Quiet hours forbid the speed it needs. */
  | 'against-quiet-hours'
  /** A closed input holds the motor slower than it needs, and a program cannot change that. */
  | 'input-too-slow'
  /** More entries are needed than the motor has. */
  | 'too-few-entries';

/**
 * A need that is not met, and by no program can be: which one, why, on which weekdays (0 = Monday). `wanted` and
 * `reachable` are gallons, hours, rpm or entries, by the need.
 */
export type UnmetNeed = {
  readonly need: NeedKind | 'daily-volume' | 'flow-hours' | 'entry-limit';
  readonly reason: UnmetReason;
  readonly weekdays: readonly number[];
  readonly wanted: number;
  readonly reachable: number;
};
