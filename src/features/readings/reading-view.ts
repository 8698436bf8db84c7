import type { PumpNow, ReadingSeries } from '#shared/contract/http/pumps.ts';

/** A series with the pump's last reading at its end, where that is newer: the line reaches now without being read anew. */
export function appendNow(series: ReadingSeries, now: PumpNow | null, until: number): ReadingSeries {
  const last = series.t.at(-1) ?? Number.NEGATIVE_INFINITY;
  if (now === null || now.at <= last || now.at >= until) return series;
  const push = <Value>(column: readonly Value[], value: Value): Value[] => [...column, value];
  return {
    ...series,
    t: push(series.t, now.at),
    rpm: push(series.rpm, now.rpm),
    rpmMin: push(series.rpmMin, now.rpm),
    rpmMax: push(series.rpmMax, now.rpm),
    expectedRpm: push(series.expectedRpm, now.expectedRpm),
    watts: push(series.watts, now.watts),
    wattsMin: push(series.wattsMin, now.watts),
    wattsMax: push(series.wattsMax, now.watts),
    closedInputs: push(series.closedInputs, now.closedInputs),
  };
}

/** Whether anything was read at all in the window: old readings are kept as runs only. */
export const hasReadings = ({ watts }: ReadingSeries): boolean => watts.some((value) => value !== null);

/** A quarter of an hour of readings, for the table behind the charts. Null where nothing was read. */
export type ReadingRow = {
  readonly at: number;
  readonly rpm: number | null;
  readonly expectedRpm: number | null;
  readonly watts: number | null;
  readonly wattsLow: number | null;
  readonly wattsHigh: number | null;
};

const STEP_MS = 15 * 60_000;

type Column = readonly (number | null)[];

const valuesOf = (column: Column, indices: readonly number[]): number[] =>
  indices.flatMap((index) => column[index] ?? []);

const mean = (values: readonly number[]): number | null =>
  values.length === 0 ? null : values.reduce((sum, value) => sum + value, 0) / values.length;

const extreme = (values: readonly number[], pick: (...values: number[]) => number): number | null =>
  values.length === 0 ? null : pick(...values);

/** The chart's numbers as rows, the latest first. */
export function tableRows(series: ReadingSeries): ReadingRow[] {
  const buckets = new Map<number, number[]>();
  series.t.forEach((at, index) => {
    const start = Math.floor(at / STEP_MS) * STEP_MS;
    buckets.set(start, [...(buckets.get(start) ?? []), index]);
  });
  return [...buckets]
    .map(([at, indices]) => ({
      at,
      rpm: mean(valuesOf(series.rpm, indices)),
      expectedRpm: mean(valuesOf(series.expectedRpm, indices)),
      watts: mean(valuesOf(series.watts, indices)),
      wattsLow: extreme(valuesOf(series.wattsMin, indices), Math.min),
      wattsHigh: extreme(valuesOf(series.wattsMax, indices), Math.max),
    }))
    .sort((a, b) => b.at - a.at);
}
