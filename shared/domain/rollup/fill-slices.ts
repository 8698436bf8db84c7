import type { Reading } from '../readings/reading.ts';
import type { Run } from '../runs/run.ts';
import { isTurning } from '../turnover/run-share.ts';
import { RUN_SOURCES, type SliceSums } from './slice-sums.ts';

export type SlicedReading = Pick<Reading, 'at' | 'rpm' | 'watts' | 'closedInputs'>;

/** A stretch between two readings, straight from one value to the other; on a hold both are the first. */
type Piece = { from: number; to: number; rpm: number; rpmEnd: number; watts: number; wattsEnd: number };

/** Slices follow one another: the one that holds an instant, from a place at or before it. */
function placeOf(slices: readonly SliceSums[], at: number, start: number): number {
  let place = start;
  while (place < slices.length && (slices[place]?.to ?? Number.POSITIVE_INFINITY) <= at) place += 1;
  return place;
}

function addPart(slice: SliceSums, piece: Piece, run: Run, closedInputs: number): void {
  const from = Math.max(piece.from, slice.from);
  const to = Math.min(piece.to, slice.to);
  const ms = to - from;
  if (ms <= 0) return;
  const length = piece.to - piece.from;
  const [begin, end] = [(from - piece.from) / length, (to - piece.from) / length];
  const rise = piece.wattsEnd - piece.watts;
  const [wattsFrom, wattsTo] = [piece.watts + rise * begin, piece.watts + rise * end];
  const climb = piece.rpmEnd - piece.rpm;
  const [rpmFrom, rpmTo] = [piece.rpm + climb * begin, piece.rpm + climb * end];
  const wattMs = ((wattsFrom + wattsTo) / 2) * ms;
  slice.wattMs += wattMs;
  slice.coveredMs += ms;
  slice.closedInputs |= closedInputs;
  slice.rpmMin = Math.min(slice.rpmMin ?? rpmFrom, rpmFrom, rpmTo);
  slice.rpmMax = Math.max(slice.rpmMax ?? rpmFrom, rpmFrom, rpmTo);
  slice.wattsMin = Math.min(slice.wattsMin ?? wattsFrom, wattsFrom, wattsTo);
  slice.wattsMax = Math.max(slice.wattsMax ?? wattsFrom, wattsFrom, wattsTo);
  const place = RUN_SOURCES.indexOf(run.source);
  slice.sourceMs[place] = (slice.sourceMs[place] ?? 0) + ms;
  if (!isTurning(run)) return;
  slice.onMs += ms;
  slice.onWattMs += wattMs;
  slice.onRpmMs += ((rpmFrom + rpmTo) / 2) * ms;
  if (run.gallons === undefined) slice.unknownFlowMs += ms;
}

/**
 * Lays readings over slices of time (in order, without holes) as runs see them: the trapezoid inside a run, the last value
 * held across a change of run, nothing over a gap, which is a `no-data` run or no run at all. Readings and runs come in
 * order; they reach from the reading before the first slice to the one after the last, where there are such. An open run
 * lasts until the last reading.
 */
export function fillSlices(
  slices: readonly SliceSums[],
  readings: readonly SlicedReading[],
  runs: readonly Run[],
): void {
  let [place, index] = [0, 0];
  for (const [count, reading] of readings.entries()) {
    const start = placeOf(slices, reading.at, place);
    const own = slices[start];
    if (own !== undefined && reading.at >= own.from) own.readings += 1;
    place = start;
    const next = readings[count + 1];
    if (next === undefined) return;
    while (index < runs.length && (runs[index]?.to ?? Number.POSITIVE_INFINITY) <= reading.at) index += 1;
    spread(slices, place, { reading, next }, runs, index);
  }
}

/** One interval between readings, cut where a run ends inside it. */
function spread(
  slices: readonly SliceSums[],
  place: number,
  { reading, next }: { readonly reading: SlicedReading; readonly next: SlicedReading },
  runs: readonly Run[],
  first: number,
): void {
  for (let index = first; index < runs.length; index += 1) {
    const run = runs[index];
    if (run === undefined || run.from >= next.at) return;
    const end = run.to ?? Number.POSITIVE_INFINITY;
    const follower = runs[index + 1];
    // A run that ends where a gap begins ended with its last reading: nothing changed there.
    const isHeld = end < next.at || (end === next.at && follower?.from === end && follower.source !== 'no-data');
    const from = Math.max(run.from, reading.at);
    const to = Math.min(end, next.at);
    if (run.source !== 'no-data' && from < to) {
      const held = isHeld || from > reading.at;
      const piece: Piece = {
        from,
        to,
        rpm: reading.rpm,
        rpmEnd: held ? reading.rpm : next.rpm,
        watts: reading.watts,
        wattsEnd: held ? reading.watts : next.watts,
      };
      let at = placeOf(slices, from, place);
      while (at < slices.length && (slices[at]?.from ?? to) < to) {
        const slice = slices[at];
        if (slice !== undefined) addPart(slice, piece, run, reading.closedInputs);
        at += 1;
      }
    }
    if (end >= next.at) return;
  }
}
