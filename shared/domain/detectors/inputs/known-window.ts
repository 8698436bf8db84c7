import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import { clockDifference } from '#shared/domain/time/clock-time.ts';
import { DAY_MINUTES, weekdayOf } from '#shared/domain/time/local-time.ts';

/**
 * A stretch of the day for which an input's clock is known to close it: recorded trippers, or learnt from edges.
 * Local minutes; `offMinute` is when the contact opens, at or below `onMinute` on the next day. `days` names the days
 * of `onMinute`, Monday first.
 */
export type KnownWindow = {
  readonly input: number;
  readonly onMinute: number;
  readonly offMinute: number;
  readonly days: readonly boolean[];
  readonly recorded: boolean;
};

/** A closing that was seen and lasted: local day since 1970, minute of the day, and how long it stayed closed, min. */
export type ClosedEdge = readonly [day: number, minute: number, lasted: number];

/** Edges are learnt after so many days that have them, and an edge is the same within these minutes. */
const LEARNING_DAYS = 4;
const SAME_EDGE_MINUTES = 30;
const REGULAR_MINUTES = 15;
const ALIKE_SHARE = 0.7;
/** Edges older than this say nothing about today. */
const REMEMBERED_DAYS = 14;

/**
 * The windows recorded for an input; the contact opens some minutes before the off tripper.
 *
 * @example recordedWindows(context, 1)[0]?.onMinute // 600
 */
export function recordedWindows({ inputs }: PumpContext, input: number): KnownWindow[] {
  const record = inputs.find(({ number }) => number === input);
  const windows = (record?.windows ?? []).map(({ onMinute, offMinute, opensEarlyMinutes, days }) => ({
    input,
    onMinute,
    offMinute: (offMinute - opensEarlyMinutes + DAY_MINUTES) % DAY_MINUTES,
    days,
    recorded: true,
  }));
  return joined(windows);
}

/** Two windows that touch are one: the contact does not open in between. */
function joined(windows: readonly KnownWindow[]): KnownWindow[] {
  const sorted = windows.toSorted((left, right) => left.onMinute - right.onMinute);
  const result: KnownWindow[] = [];
  for (const window of sorted) {
    const last = result.at(-1);
    const sameDays = last !== undefined && window.days.every((on, weekday) => on === last.days[weekday]);
    const touches = last !== undefined && window.onMinute - last.onMinute <= windowMinutes(last);
    if (last === undefined || !sameDays || !touches) result.push(window);
    else if (endOf(window) > endOf(last)) result[result.length - 1] = { ...last, offMinute: window.offMinute };
  }
  return result;
}

const endOf = (window: KnownWindow): number => window.onMinute + windowMinutes(window);

/**
 * Whether an input's windows may be learnt: a clock, or an input nobody recorded. People, heaters and solar
 * controllers keep no hours.
 */
export function keepsHours({ inputs }: PumpContext, input: number): boolean {
  const record = inputs.find(({ number }) => number === input);
  return record === undefined || record.kind === 'clock';
}

/**
 * The windows that regular edges show: the same time of day and length, within a quarter of an hour, on four days of
 * the last six. Empty where there is no such regularity.
 *
 * @example learnWindows(2, [[20240, 480, 119], [20241, 481, 120], [20242, 480, 120], [20243, 479, 121]])[0]?.onMinute // 480
 */
export function learnWindows(input: number, edges: readonly ClosedEdge[]): KnownWindow[] {
  const today = edges.at(-1)?.[0] ?? 0;
  let left = edges.filter(([day]) => today - day < REMEMBERED_DAYS);
  const windows: KnownWindow[] = [];
  while (left.length >= LEARNING_DAYS) {
    const seed = left.at(-1)?.[1] ?? 0;
    const same = left.filter(([, minute]) => Math.abs(clockDifference(seed, minute)) <= SAME_EDGE_MINUTES);
    const window = windowOf(input, same, today);
    if (window !== undefined) windows.push(window);
    left = left.filter((edge) => !same.includes(edge));
  }
  return windows;
}

function windowOf(input: number, edges: readonly ClosedEdge[], today: number): KnownWindow | undefined {
  const recentDays = new Set(edges.map(([day]) => day).filter((day) => today - day < LEARNING_DAYS + 2));
  if (recentDays.size < LEARNING_DAYS) return undefined;
  const seed = edges.at(-1)?.[1] ?? 0;
  const away = edges.map(([, minute]) => clockDifference(seed, minute));
  const mean = away.reduce((sum, one) => sum + one, 0) / away.length;
  const regular = away.every((one) => Math.abs(one - mean) <= REGULAR_MINUTES);
  const lengths = edges.map(([, , minutes]) => minutes).filter((minutes) => minutes > 0);
  const lasted = medianOf(lengths);
  if (!regular || lasted === undefined) return undefined;
  // A sun that reaches the panels at the same hour keeps it no longer: a clock's windows are as long every day.
  const alike = lengths.filter((minutes) => Math.abs(minutes - lasted) <= REGULAR_MINUTES);
  if (alike.length < ALIKE_SHARE * lengths.length) return undefined;
  const onMinute = (seed + mean + DAY_MINUTES) % DAY_MINUTES;
  return { input, onMinute, offMinute: (onMinute + lasted) % DAY_MINUTES, days: daysOf(edges), recorded: false };
}

/** Days in a row with a weekend day among them mean every day; else only the weekdays that were seen. */
function daysOf(edges: readonly ClosedEdge[]): readonly boolean[] {
  const seen = [0, 1, 2, 3, 4, 5, 6].map((weekday) => edges.some(([day]) => weekdayOf(day) === weekday));
  const days = new Set(edges.map(([day]) => day));
  const last = edges.at(-1)?.[0] ?? 0;
  let inRow = 0;
  while (days.has(last - inRow)) inRow += 1;
  const everyDay = inRow >= LEARNING_DAYS && (seen[5] === true || seen[6] === true);
  return everyDay ? seen.map(() => true) : seen;
}

function medianOf(values: readonly number[]): number | undefined {
  return values.toSorted((left, right) => left - right)[Math.floor(values.length / 2)];
}

/** How long a window lasts, minutes, over 0 and up to a day. */
export function windowMinutes({ onMinute, offMinute }: KnownWindow): number {
  const minutes = (offMinute - onMinute + DAY_MINUTES) % DAY_MINUTES;
  return minutes === 0 ? DAY_MINUTES : minutes;
}
