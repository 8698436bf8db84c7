import { type Dial, dialMs, minuteOfWeek, realMs } from './dial.ts';

/** A stretch that repeats every week: minutes of the day on the days flagged, Monday first; it may pass midnight. */
export type WeekWindow = { readonly days: readonly boolean[]; readonly fromMinute: number; readonly toMinute: number };

/** Edges in the week, sorted, and which windows are on after each. */
export type WeekPlan = { readonly edges: readonly WeekEdge[] };
type WeekEdge = { readonly minute: number; readonly on: readonly number[] };

const WEEK_MINUTES = 7 * 1440;
const NONE: readonly number[] = [];

/** Lays windows out over the week. `on` lists the windows' places in the order given. */
export function planWeek(windows: readonly WeekWindow[]): WeekPlan {
  const stretches = windows.flatMap((window, index) => {
    const length =
      window.toMinute > window.fromMinute
        ? window.toMinute - window.fromMinute
        : window.toMinute + 1440 - window.fromMinute;
    return window.days.flatMap((flag, day) => (flag ? [{ index, from: day * 1440 + window.fromMinute, length }] : []));
  });
  const minutes = new Set(
    stretches.flatMap(({ from, length }) => [from % WEEK_MINUTES, (from + length) % WEEK_MINUTES]),
  );
  const isOn = (minute: number) =>
    stretches
      .filter(({ from, length }) => (minute - from + 2 * WEEK_MINUTES) % WEEK_MINUTES < length)
      .map(({ index }) => index);
  const edges = [...minutes]
    .sort((a, b) => a - b)
    .map((minute) => ({ minute, on: [...new Set(isOn(minute))].sort((a, b) => a - b) }));
  return { edges };
}

/** Which windows are on by this dial, and when (real ms) that can next change. */
export function readWeekPlan(
  plan: WeekPlan,
  dial: Dial,
  at: number,
): { readonly on: readonly number[]; readonly until: number } {
  const { edges } = plan;
  const first = edges[0];
  const last = edges.at(-1);
  if (first === undefined || last === undefined) return { on: NONE, until: Number.POSITIVE_INFINITY };
  // A millisecond ahead, so that an edge that rounding put on this instant counts as passed.
  const minute = minuteOfWeek(dialMs(dial, at) + 1);
  const next = edges.findIndex((edge) => edge.minute > minute);
  const current = next === -1 ? last : next === 0 ? last : edges[next - 1];
  const nextMinute = next === -1 ? first.minute + WEEK_MINUTES : (edges[next]?.minute ?? first.minute);
  return { on: current?.on ?? NONE, until: Math.max(at + 1, Math.round(at + 1 + realMs(dial, nextMinute - minute))) };
}
