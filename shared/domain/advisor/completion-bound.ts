import type { FlatProblem } from './flat-problem.ts';

/** What a gallon and a counted slot are worth in the Lagrangian: their prices. */
export type Worth = { readonly perGallon: number; readonly perCount: number };

/**
 * The least that the rest of a day can cost, less the worth of its water and counts: from a slot on, with so many
 * entries left, coming from a choice. Laid out by slot, entries left and choice.
 */
export type CompletionBound = Worth & {
  readonly rowLength: number;
  readonly width: number;
  readonly table: Float64Array;
};

/** The bound from a slot on, with entries left, coming from a choice. Infinity where no program goes on from there. */
export const completionAt = (
  { table, rowLength, width }: CompletionBound,
  slot: number,
  left: number,
  choice: number,
): number => table[slot * rowLength + left * width + choice] ?? Number.POSITIVE_INFINITY;

/** The choices of one slot with their worth taken off: to stay or go on in a choice, and to start into it from rest. */
type Reduced = { readonly stay: Float64Array; readonly start: Float64Array };

function reduceSlot(flat: FlatProblem, slot: number, { perGallon, perCount }: Worth, reduced: Reduced): void {
  const from = slot * flat.width;
  for (let choice = 0; choice < flat.width; choice += 1) {
    const at = from + choice;
    const stay = (flat.cost[at] ?? 0) - perGallon * (flat.gallons[at] ?? 0) - perCount * (flat.counts[at] ?? 0);
    reduced.stay[choice] = stay;
    reduced.start[choice] = stay + (flat.startCost[at] ?? 0) + perGallon * (flat.startLoss[at] ?? 0);
  }
}

/** One slot with `left` entries left, for every choice before it: stay, go off, or change to the best speed. */
function fillRow(bound: CompletionBound, here: number, reduced: Reduced, left: number): void {
  const { table, width, rowLength } = bound;
  const { stay, start } = reduced;
  const next = here + rowLength;
  const less = next - width;
  let [started, changed] = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  for (let choice = 1; left > 0 && choice < width; choice += 1) {
    const after = table[less + choice] ?? 0;
    const changing = (stay[choice] ?? 0) + after;
    const starting = (start[choice] ?? 0) + after;
    if (changing < changed) changed = changing;
    if (starting < started) started = starting;
  }
  const off = (stay[0] ?? 0) + (table[next] ?? 0);
  const other = Math.min(off, changed);
  table[here] = Math.min(off, started);
  for (let choice = 1; choice < width; choice += 1) {
    const staying = (stay[choice] ?? 0) + (table[next + choice] ?? 0);
    table[here + choice] = Math.min(staying, other);
  }
}

/**
 * Builds the table of completion bounds, last slot first: dynamic programming over slots, entries left and choices.
 * `endChoice` is the day's last choice, for a day that leads into itself.
 *
 * @example completionAt(buildCompletionBound(flat, { perGallon: 0, perCount: 0 }, undefined), 0, 4, 0)
 * Source: Lagrangian relaxation of the water and hours asked for.
 */
export function buildCompletionBound(flat: FlatProblem, worth: Worth, endChoice: number | undefined): CompletionBound {
  const { slots, width, problem } = flat;
  const rowLength = (problem.entryLimit + 1) * width;
  const table = new Float64Array((slots + 1) * rowLength);
  const bound: CompletionBound = { ...worth, rowLength, width, table };
  if (endChoice !== undefined) {
    table.fill(Number.POSITIVE_INFINITY, slots * rowLength);
    for (let left = 0; left <= problem.entryLimit; left += 1) table[slots * rowLength + left * width + endChoice] = 0;
  }
  const reduced: Reduced = { stay: new Float64Array(width), start: new Float64Array(width) };
  for (let slot = slots - 1; slot >= 0; slot -= 1) {
    reduceSlot(flat, slot, worth, reduced);
    for (let left = 0; left <= problem.entryLimit; left += 1)
      fillRow(bound, slot * rowLength + left * width, reduced, left);
  }
  return bound;
}

/** The least that a whole program can cost that meets the day's needs, from a first choice: the dual value. */
export const dualValue = ({ problem }: FlatProblem, bound: CompletionBound, firstChoice: number): number =>
  completionAt(bound, 0, problem.entryLimit, firstChoice) +
  bound.perGallon * problem.wantedGallons +
  bound.perCount * problem.wantedCount;
