/** Every detector's stable slug. */
export const DETECTORS = [
  'wrong-speed',
  'input-disagreement',
  'missing-input',
  'stuck-input',
  'chattering-input',
  'failed-prime',
  'slow-prime',
  'loss-of-prime',
  'low-load',
  'high-load',
  'stopped',
  'unexpected-run',
  'clock-shift',
  'motor-clock',
  'fed-through-clock',
  'keypad-hold',
  'settings-changed',
  'energized-without-flow',
  'too-little-water',
  'freezing',
  'supply-voltage',
  'drive-fault',
  'drive-hot',
  'silent',
  'clock-skew',
  'costly-program',
] as const;
export type Detector = (typeof DETECTORS)[number];

/** urgent = needs a call today; soon = within days; note = for the next stop. */
export const PRIORITIES = ['urgent', 'soon', 'note'] as const;
export type Priority = (typeof PRIORITIES)[number];

/**
 * Whether one priority asks for a person sooner than another.
 *
 * @example isWorse('urgent', 'soon') // true
 */
export const isWorse = (one: Priority, other: Priority): boolean => PRIORITIES.indexOf(one) < PRIORITIES.indexOf(other);

/** alarm = someone must respond; note = for the work list. */
export type AlarmClass = 'alarm' | 'note';

/** Numbers and words a person can check: plain JSON, each number's unit in its name. */
export type Evidence = Readonly<Record<string, number | string | boolean | null | readonly (number | string)[]>>;

/**
 * What a detector says. `from` = when the condition began, `at` = when the rule spoke (device time, ms; arrival for
 * silence). `cause` is a slug of the detector's table, or `unknown` where the readings cannot tell.
 */
export type AlarmSignal =
  | {
      readonly type: 'raised';
      readonly detector: Detector;
      readonly alarmClass: AlarmClass;
      readonly priority: Priority;
      readonly from: number;
      readonly at: number;
      readonly cause: string;
      readonly evidence: Evidence;
    }
  | {
      readonly type: 'changed';
      readonly detector: Detector;
      readonly alarmClass: AlarmClass;
      readonly priority: Priority;
      readonly from: number;
      readonly at: number;
      readonly cause: string;
      readonly evidence: Evidence;
    }
  | { readonly type: 'cleared'; readonly detector: Detector; readonly at: number; readonly evidence: Evidence };
