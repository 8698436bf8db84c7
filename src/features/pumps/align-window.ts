/** Half-open, ms. */
export type TimeWindow = { readonly from: number; readonly until: number };

const STEP_MS = 6 * 3_600_000;

/**
 * A window widened to whole quarters of a UTC day: a wall that moves with the clock asks again only four times a day,
 * and every row of it asks for the same stretch.
 *
 * @example alignWindow({ from: 1, until: 2 }) // { from: 0, until: 21600000 }
 */
export function alignWindow({ from, until }: TimeWindow): TimeWindow {
  return { from: Math.floor(from / STEP_MS) * STEP_MS, until: Math.ceil(until / STEP_MS) * STEP_MS };
}
