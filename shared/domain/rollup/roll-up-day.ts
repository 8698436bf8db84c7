import { listDayHours } from '../energy/day-hours.ts';
import type { Run } from '../runs/run.ts';
import type { LocalDay } from '../time/local-days.ts';
import { MINUTE_MS } from '../time/local-time.ts';
import { shareOfRun } from '../turnover/run-share.ts';
import { fillSlices, type SlicedReading } from './fill-slices.ts';
import { emptySlice, mergeSlices, RUN_SOURCES, type SliceSums } from './slice-sums.ts';

/** An hour of a day with the watt-hours of its largest quarter: what a demand price goes by. */
export type HourSums = SliceSums & { readonly quarterWattHours: number; readonly hour: number };

/** A local day in steps of five minutes, by hours, and as a whole. */
export type DayRollup = {
  readonly day: LocalDay;
  readonly fives: readonly SliceSums[];
  readonly hours: readonly HourSums[];
  readonly whole: SliceSums;
};

/** Length of the finest step kept. Every zone's offset is a multiple of it, so that hours are made of whole steps. */
export const FIVE_MS = 5 * MINUTE_MS;
const WATT_MS_PER_WH = 3_600_000;

const NO_DATA = RUN_SOURCES.indexOf('no-data');

function cutFives({ from, to }: LocalDay): SliceSums[] {
  const fives: SliceSums[] = [];
  for (let at = from; at < to; at += FIVE_MS) fives.push(emptySlice(at, Math.min(at + FIVE_MS, to)));
  return fives;
}

/** A run is one settled speed: its water is spread evenly over its time. An open one lasts until `upTo`. */
function pourWater(fives: readonly SliceSums[], runs: readonly Run[], upTo: number): void {
  for (const run of runs) {
    if (run.gallons === undefined || !(run.gallons > 0) || !Number.isFinite(run.gallons)) continue;
    const span = { from: run.from, to: run.to ?? upTo };
    for (const five of fives) {
      if (five.to <= span.from) continue;
      if (five.from >= span.to) break;
      const share = shareOfRun(span, five.from, five.to)?.share ?? 0;
      five.gallons += run.gallons * share;
      five.gallonsSigma += (run.gallonsSigma ?? Number.NaN) * share;
    }
  }
}

function findLargestQuarter(fives: readonly SliceSums[]): number {
  let largest = 0;
  for (let index = 0; index < fives.length; index += 3) {
    const quarter = fives.slice(index, index + 3).reduce((sum, { wattMs }) => sum + wattMs, 0);
    largest = Math.max(largest, quarter / WATT_MS_PER_WH);
  }
  return largest;
}

/**
 * Rolls a local day of one pump up from its readings and runs: energy (trapezoid inside a run, held across a change,
 * nothing over a gap), time on, time by source, water, extremes. `readings` and `runs` reach over the day's edges where
 * there are such; `upTo` (ms) is how far the readings have been understood: later ones must not be among them, and the rest
 * of the day is not `no-data` but still to come. The answer is the same whatever the batches the readings came in.
 *
 * @example rollUpDay('America/Phoenix', day, readings, runs, upTo).whole.wattMs / 3_600_000 // watt-hours of the day
 */
export function rollUpDay(
  zone: string,
  day: LocalDay,
  readings: readonly SlicedReading[],
  runs: readonly Run[],
  upTo: number,
): DayRollup {
  const fives = cutFives(day);
  fillSlices(fives, readings, runs);
  pourWater(fives, runs, upTo);
  for (const five of fives) {
    const known = Math.max(0, Math.min(five.to, upTo) - five.from);
    five.sourceMs[NO_DATA] = Math.max(0, known - five.coveredMs);
  }
  const hours = listDayHours(zone, day).map(({ from, to, hour }): HourSums => {
    const own = fives.slice(Math.round((from - day.from) / FIVE_MS), Math.round((to - day.from) / FIVE_MS));
    return { ...mergeSlices(from, to, own), quarterWattHours: findLargestQuarter(own), hour };
  });
  return { day, fives, hours, whole: mergeSlices(day.from, day.to, hours) };
}
