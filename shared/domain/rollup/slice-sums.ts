import { type RunSource, SOURCES } from '../readings/reading.ts';

/** Every source that a stretch of time may be under, in the order of `sourceMs`. */
export const RUN_SOURCES: readonly RunSource[] = [...SOURCES, 'no-data', 'unknown'];

/**
 * What a pump did in a half-open stretch (ms). Watts and rpm are weighted by their ms; those with `on` count only time in
 * runs of a turning shaft. Extremes are undefined where no reading covers the stretch. `gallons` are the least there was
 * while `unknownFlowMs` (time turning of which the flow is not known) is above 0.
 */
export type SliceSums = {
  readonly from: number;
  readonly to: number;
  wattMs: number;
  coveredMs: number;
  onMs: number;
  onRpmMs: number;
  onWattMs: number;
  gallons: number;
  /** One sigma, which adds up: the flow meter errs the same way all along. NaN where it is not known. */
  gallonsSigma: number;
  unknownFlowMs: number;
  readings: number;
  closedInputs: number;
  rpmMin: number | undefined;
  rpmMax: number | undefined;
  wattsMin: number | undefined;
  wattsMax: number | undefined;
  /** ms by source, in the order of RUN_SOURCES. */
  readonly sourceMs: number[];
};

/** A stretch of which nothing is known yet. */
export const emptySlice = (from: number, to: number): SliceSums => ({
  from,
  to,
  wattMs: 0,
  coveredMs: 0,
  onMs: 0,
  onRpmMs: 0,
  onWattMs: 0,
  gallons: 0,
  gallonsSigma: 0,
  unknownFlowMs: 0,
  readings: 0,
  closedInputs: 0,
  rpmMin: undefined,
  rpmMax: undefined,
  wattsMin: undefined,
  wattsMax: undefined,
  sourceMs: RUN_SOURCES.map(() => 0),
});

const least = (left: number | undefined, right: number | undefined): number | undefined =>
  left === undefined || right === undefined ? (left ?? right) : Math.min(left, right);
const most = (left: number | undefined, right: number | undefined): number | undefined =>
  left === undefined || right === undefined ? (left ?? right) : Math.max(left, right);

function addSlice(sum: SliceSums, part: SliceSums): void {
  sum.wattMs += part.wattMs;
  sum.coveredMs += part.coveredMs;
  sum.onMs += part.onMs;
  sum.onRpmMs += part.onRpmMs;
  sum.onWattMs += part.onWattMs;
  sum.gallons += part.gallons;
  sum.gallonsSigma += part.gallonsSigma;
  sum.unknownFlowMs += part.unknownFlowMs;
  sum.readings += part.readings;
  sum.closedInputs |= part.closedInputs;
  sum.rpmMin = least(sum.rpmMin, part.rpmMin);
  sum.rpmMax = most(sum.rpmMax, part.rpmMax);
  sum.wattsMin = least(sum.wattsMin, part.wattsMin);
  sum.wattsMax = most(sum.wattsMax, part.wattsMax);
  for (const [index, ms] of part.sourceMs.entries()) sum.sourceMs[index] = (sum.sourceMs[index] ?? 0) + ms;
}

/**
 * The slices of a longer stretch as one: sums add, extremes are the extremes of extremes; never a mean of means.
 *
 * @example mergeSlices(hourFrom, hourTo, twelveFives).wattMs / 3_600_000 // watt-hours of the hour
 */
export function mergeSlices(from: number, to: number, parts: readonly SliceSums[]): SliceSums {
  const sum = emptySlice(from, to);
  for (const part of parts) addSlice(sum, part);
  return sum;
}
