/** Watts in bins of one per cent, seconds in each: enough for a median and a spread, small enough to store. */
export type WattsSketch = { [bin: number]: number };

/** Median and median absolute deviation of what a sketch holds, W, over so many seconds. */
export type Spread = { readonly seconds: number; readonly median: number; readonly mad: number };

const BIN_WIDTH = 0.01;

/**
 * Counts watts for some seconds. Watts at or below zero, and what is no number, are left out.
 *
 * @example addToSketch(sketch, 1180, 10)
 */
export function addToSketch(sketch: WattsSketch, watts: number, seconds: number): void {
  if (!(watts > 0) || !(seconds > 0)) return;
  const bin = Math.round(Math.log(watts) / BIN_WIDTH);
  sketch[bin] = (sketch[bin] ?? 0) + seconds;
}

/** Adds every bin of one sketch to another. */
export function mergeSketch(into: WattsSketch, from: WattsSketch): void {
  for (const [key, seconds] of Object.entries(from)) {
    const bin = Number(key);
    into[bin] = (into[bin] ?? 0) + seconds;
  }
}

/**
 * Median and spread of a sketch, good to half a per cent; undefined where it is empty.
 *
 * @example sketchSpread({}) // undefined
 */
export function sketchSpread(sketch: WattsSketch): Spread | undefined {
  const bins = Object.entries(sketch).map(([bin, seconds]) => ({
    value: Math.exp(Number(bin) * BIN_WIDTH),
    weight: seconds,
  }));
  const median = weightedMedian(bins);
  if (median === undefined) return undefined;
  const away = bins.map(({ value, weight }) => ({ value: Math.abs(value - median), weight }));
  return {
    seconds: bins.reduce((sum, { weight }) => sum + weight, 0),
    median,
    mad: weightedMedian(away) ?? 0,
  };
}

/**
 * The value below which half of the weight lies; undefined where there is no weight.
 *
 * @example weightedMedian([{ value: 1, weight: 1 }, { value: 9, weight: 3 }]) // 9
 */
export function weightedMedian(
  entries: readonly { readonly value: number; readonly weight: number }[],
): number | undefined {
  const sorted = [...entries].filter(({ weight }) => weight > 0).sort((left, right) => left.value - right.value);
  const half = sorted.reduce((sum, { weight }) => sum + weight, 0) / 2;
  let seen = 0;
  for (const { value, weight } of sorted) {
    seen += weight;
    if (seen >= half) return value;
  }
  return undefined;
}
